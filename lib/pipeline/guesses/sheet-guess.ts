import type { GuessTopic } from '@/lib/engine/guesses/guess';
import type { Convention } from '@/lib/explain/conventions/convention';

/** One value of the sheet, written at its place; null takes the word out. */
export interface SheetChange {
  readonly field: string;
  readonly value: string | number | readonly string[] | Readonly<Record<string, string>> | null;
}

/** What the data of one file say of one word of the sheet. It changes nothing until its author confirms it. */
export interface SheetGuess {
  readonly about: GuessTopic;
  readonly part: 'waveforms' | 'noise';
  /** The name of the waveform or curve in the sheet. */
  readonly name: string;
  /** JSON Pointer of the word. */
  readonly field: string;
  readonly standing: 'declared' | 'assumed';
  /** The value in use, declared or assumed; null where there is none. */
  readonly value: string | number | null;
  readonly agrees: boolean;
  /** In words. */
  readonly proposed: string;
  /** What makes the sheet say what the data say; null where no word of a sheet does. */
  readonly changes: readonly SheetChange[] | null;
  /** With the measured number and the expected one. */
  readonly reason: string;
  /** From 0 to 1: a judgement of how seldom the sign deceives, no computed probability. */
  readonly confidence: number;
  /** The row of the table of conventions; null for the unit of time, which has none. */
  readonly convention: Pick<Convention, 'id' | 'title' | 'sentence'> | null;
}
