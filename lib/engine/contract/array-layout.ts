import type { ModeIndex } from './settings';

/** Where the parts of a waveform stand in a file of arrays: what the sheet says under `datasets` and `time`. */
export interface ArrayLayout {
  readonly format: 'npy' | 'npz' | 'hdf5';
  /** Empty for an `.npy`, which is one array with the declared columns. */
  readonly parts: readonly ArrayPart[];
  /** The axis of parts that do not bring their own: a dataset, or even steps from a start. */
  readonly time: string | EvenAxis | null;
}

export interface EvenAxis {
  readonly start: number;
  readonly step: number;
}

export interface ArrayPart {
  readonly role:
    /** One mode: N×3 with its times, N×2, or complex. */
    | { readonly kind: 'mode'; readonly mode: ModeIndex }
    /** One real vector that stands for a column of this name. */
    | { readonly kind: 'column'; readonly name: string }
    /** All modes in one array, L×N or N×L. */
    | { readonly kind: 'data' }
    /** The (l, m) of each, L×2; without it an attribute of the data lists them. */
    | { readonly kind: 'modes' };
  /** The dataset, with a selection if one is made: `/a/b`, `/a/b[0,:]`, `/table[re]`. */
  readonly path: string;
}
