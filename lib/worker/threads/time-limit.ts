/** Between two looks: a limit of minutes need not be kept to the moment. */
const LOOK_MS = 250;

export interface TimeLimit {
  readonly signal: AbortSignal;
  readonly pause: (paused: boolean) => void;
  readonly close: () => void;
}

/** Aborts once this much time has gone by, of which a pause is no part. */
export function openTimeLimit(limitMs: number): TimeLimit {
  const over = new AbortController();
  let left = limitMs;
  let paused = false;
  let seen = performance.now();
  const look = (): void => {
    const now = performance.now();
    if (!paused) left -= now - seen;
    seen = now;
    if (left <= 0) over.abort();
  };
  const timer = setInterval(look, Math.min(LOOK_MS, limitMs));
  timer.unref();
  const pause = (now: boolean): void => {
    look();
    paused = now;
  };
  return { signal: over.signal, pause, close: () => clearInterval(timer) };
}
