import type { Reader } from '@/db/client';
import { stopAsked } from '@/db/reads/runs/stop-asked';

/** Quick enough for somebody who pressed a button, slow enough for a database. */
const EVERY_MS = 500;

export interface StopWatch {
  readonly signal: AbortSignal;
  /** No more is asked after this. */
  readonly close: () => void;
}

/** Looks now and then whether a run is still wanted. A look that fails is no word either way: the next one asks again. */
export function watchForStop(db: Reader, runId: string): StopWatch {
  const stop = new AbortController();
  const look = (): void =>
    void stopAsked(db, runId).then(
      (asked) => asked && stop.abort(),
      () => undefined,
    );
  const timer = setInterval(look, EVERY_MS);
  return { signal: stop.signal, close: () => clearInterval(timer) };
}
