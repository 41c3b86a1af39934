/** Who goes first when there are more jobs than slots. The smaller number goes first; among equals the older job. */
export const URGENCY = {
  /** Somebody sits before the screen. */
  check: 0,
  variation: 10,
  /** Lodged: the desk waits, and nobody stares at it. */
  official: 20,
  /** A record that stands, measured again. */
  recheck: 30,
} as const;

/** Added to what nobody waits for, such as the rest of a demonstration. */
const NOBODY_WAITS = 40;

/** A search for other readings goes after the numbers of whoever waits, and before what nobody waits for. */
export const SEARCHING = 25;

/**
 * Words on a job by which a worker with little room leaves it where it is: `can-wait` for everything that nobody
 * watches, `unhurried` for what is owed to nobody at a given time, `put-off` for a run whose search has been put back once.
 */
export type WaitingFlag = 'can-wait' | 'unhurried' | 'put-off';

export const flagsOf = (urgency: number): readonly WaitingFlag[] => [...(urgency >= URGENCY.official ? (['can-wait'] as const) : []), ...(urgency >= URGENCY.recheck ? (['unhurried'] as const) : [])];

let added = 0;

export const urgencyOf = (what: keyof typeof URGENCY): number => URGENCY[what] + added;

/** Said by a process for all that it will ask for; what is given back takes the word away. */
export function nobodyWaits(): () => void {
  added = NOBODY_WAITS;
  return () => {
    added = 0;
  };
}
