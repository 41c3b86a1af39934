import type { MessagePort } from 'node:worker_threads';
import type { SheetJob } from '../compute';

/** What crosses to the thread; the port carries progress back and is transferred. */
export interface SheetTask extends SheetJob {
  readonly port: MessagePort;
  readonly wishes: StopWishes;
}

/**
 * Two words of shared memory, since a loop over samples cannot listen for messages: the first is set
 * when the run is wanted no longer, the second when its numbers are there and the search has begun.
 */
export type StopWishes = Int32Array<SharedArrayBuffer>;
export const newWishes = (): StopWishes => new Int32Array(new SharedArrayBuffer(8));
export const askToEnd = (wishes: StopWishes): void => void Atomics.store(wishes, 0, 1);
export const searchHasBegun = (wishes: StopWishes): boolean => Atomics.load(wishes, 1) === 1;

/** Asked by the search itself, before each reading. */
export function endedByHand(wishes: StopWishes): string | null {
  Atomics.store(wishes, 1, 1);
  return Atomics.load(wishes, 0) === 1 ? 'it was stopped by the one who asked for the run' : null;
}

export interface ProgressNote {
  readonly fraction: number;
  readonly doing: string;
}
