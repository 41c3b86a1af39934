import type { MessagePort } from 'node:worker_threads';
import type { SheetJob } from '../compute';

/** What crosses to the thread; the port carries progress back and is transferred. */
export interface SheetTask extends SheetJob {
  readonly port: MessagePort;
  readonly wishes: Wishes;
}

/**
 * Three words of shared memory, since a loop over samples cannot listen for messages: the run is wanted no
 * longer; its numbers are there and the search has begun; it has to stand still while more urgent runs compute.
 */
export type Wishes = Int32Array<SharedArrayBuffer>;
const [END, SEARCHES, ASIDE] = [0, 1, 2];

export const newWishes = (): Wishes => new Int32Array(new SharedArrayBuffer(12));
export const searchHasBegun = (wishes: Wishes): boolean => Atomics.load(wishes, SEARCHES) === 1;

export function askToEnd(wishes: Wishes): void {
  Atomics.store(wishes, END, 1);
  Atomics.notify(wishes, ASIDE);
}

export function askToStepAside(wishes: Wishes, aside: boolean): void {
  Atomics.store(wishes, ASIDE, aside ? 1 : 0);
  Atomics.notify(wishes, ASIDE);
}

/** Asked by the search itself, before each reading; true the first time. */
export const beginSearch = (wishes: Wishes): boolean => Atomics.exchange(wishes, SEARCHES, 1) === 0;

export const endedByHand = (wishes: Wishes): string | null => (Atomics.load(wishes, END) === 1 ? 'it was stopped by the one who asked for the run' : null);

/** A thread that sleeps is woken at the latest after this, so that it can be ended. */
const LONGEST_SLEEP_MS = 500;

/** In the thread: sleeps as long as others go first, and gives the time that this took. */
export function stepAside(wishes: Wishes, now: () => number): number {
  const mustWait = (): boolean => Atomics.load(wishes, ASIDE) === 1 && Atomics.load(wishes, END) === 0;
  if (!mustWait()) return 0;
  const from = now();
  while (mustWait()) Atomics.wait(wishes, ASIDE, 1, LONGEST_SLEEP_MS);
  return now() - from;
}

export interface ProgressNote {
  readonly fraction: number;
  readonly doing: string;
}

/** What comes back before the result. */
export type ThreadNote = ProgressNote | 'searching';
