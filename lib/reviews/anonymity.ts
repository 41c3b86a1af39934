import type { Side } from './threads';

/**
 * What crosses the anonymity line (default mode: authors named, referees not). A referee is a
 * letter, stable within one submission and drawn at random, so that the order of invitation
 * cannot be read off; a time that crosses the line is a day.
 */
export const REFEREE_SLOTS = ['A', 'B', 'C', 'D', 'E', 'F', 'G', 'H'] as const;

export const pseudonym = (slot: string): string => `Referee ${slot}`;

/** `pick(n)` gives an integer in [0, n). Undefined when all letters are taken. */
export function drawSlot(taken: readonly string[], pick: (n: number) => number): string | undefined {
  const free = REFEREE_SLOTS.filter((slot) => !taken.includes(slot));
  return free.length === 0 ? undefined : free[pick(free.length)];
}

/** Somebody who wrote something, as the database knows them. */
export interface Writer {
  readonly userId: string;
  readonly name: string;
  readonly side: Side;
  /** Set for referees only. */
  readonly slot: string | null;
}
export interface Viewer {
  readonly userId: string;
  readonly side: Side;
}

/** A byline as one reader sees it. `userId` of a writer never leaves this room. */
export interface Byline {
  readonly by: string;
  readonly side: Side;
  readonly yours: boolean;
}

export function bylineFor(writer: Writer, viewer: Viewer): Byline {
  const yours = writer.userId === viewer.userId;
  const hidden = writer.side === 'referee' && viewer.side !== 'editor';
  const by = hidden && writer.slot !== null ? pseudonym(writer.slot) : writer.name;
  if (hidden && writer.slot === null) throw new Error('a referee without a letter cannot be shown');
  return { by, side: writer.side, yours };
}

/** An instant, or only its UTC day where the anonymity line lies between writer and reader. */
export type SeenTime = { readonly precision: 'instant'; readonly at: string } | { readonly precision: 'day'; readonly on: string };

export const utcDay = (instant: string): string => new Date(instant).toISOString().slice(0, 10);

export function timeFor(instant: string, writer: Writer, viewer: Viewer): SeenTime {
  const own = writer.userId === viewer.userId;
  const sameSide = writer.side === 'authors' && viewer.side === 'authors';
  const exact = own || sameSide || writer.side === 'editor' || viewer.side === 'editor';
  return exact ? { precision: 'instant', at: new Date(instant).toISOString() } : { precision: 'day', on: utcDay(instant) };
}
