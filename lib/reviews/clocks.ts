/** How long each holder of the ball has (domain.md 6.1 and 6.9), in days. The clock itself is an argument. */
export const CLOCK_DAYS = {
  triage: 5,
  recruit: 15,
  invitation: 8,
  firstReport: 21,
  laterReport: 14,
  decision: 7,
  revision: 30,
  checking: 1,
  signing: 1,
} as const;

/** A report is chased from two days before it is due, an invitation from the sixth day of silence. */
export const CHASE_BEFORE_DUE_DAYS = 2;
export const CHASE_INVITATION_AFTER_DAYS = 6;

const DAY_MS = 86_400_000;

export const addDays = (instant: string, days: number): string => new Date(Date.parse(instant) + days * DAY_MS).toISOString();

/** Day 1 is the day the ball arrived. */
export const dayOf = (since: string, now: string): number => Math.max(1, Math.floor((Date.parse(now) - Date.parse(since)) / DAY_MS) + 1);

export const reportDays = (round: number): number => (round <= 1 ? CLOCK_DAYS.firstReport : CLOCK_DAYS.laterReport);
