import { conventionById } from './conventions/conventions';
import type { ConventionId } from './conventions/convention';
import type { Flip } from './flip';

/** A stretch of the files' own time that is set to zero. */
export interface Mask {
  readonly from: number;
  readonly to: number;
}

/** What a variation reads otherwise, beside what its sheet says. No sheet can hold it, so no official run does. */
export interface ReadOtherwise {
  /** Ids of readings, as the base run offered them. */
  readonly readings: readonly string[];
  readonly mask?: Mask;
}

/** One reading of the catalogue that a claim could be given, with what it takes. */
export interface OfferedReading {
  /** `C01:root`: convention and option. */
  readonly id: string;
  readonly convention: ConventionId;
  /** To stand after "as if": `the noise column, an amplitude density, is used as if it were the power density`. */
  readonly clause: string;
  /** Where settings of a sheet, or a built-in curve, say the same. */
  readonly says: { readonly settings?: Readonly<Record<string, unknown>>; readonly noise?: string } | null;
  /** Where it is a factor on the number, one for all points or one a point. */
  readonly factor: number | readonly number[] | null;
}

function saidBy({ convention, change, declares }: Flip): OfferedReading['says'] {
  const [edit, ...more] = change.kind === 'rerun' ? (change.inputs ?? []) : [];
  const named = Object.keys(declares);
  if (edit !== undefined) return edit.edit === 'noise-curve' && more.length === 0 && named.length === 0 ? { noise: edit.curve } : null;
  if (named.length === 0 || (change.kind === 'rerun' && (change.perPoint !== undefined || (change.scaled !== undefined && !(change.scaled.setting in declares))))) return null;
  // A threshold that stands in for a factor of loudness says something else than the reading.
  const own: readonly string[] = conventionById(convention).settings;
  return named.every((name) => own.includes(name)) ? { settings: declares } : null;
}

export const offeredReading = (flip: Flip): OfferedReading => ({
  id: flip.id,
  convention: flip.convention,
  clause: flip.clause,
  says: saidBy(flip),
  factor: flip.change.kind === 'factor' ? flip.change.factor : null,
});
