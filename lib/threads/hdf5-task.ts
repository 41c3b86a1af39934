import type { ArrayStructure } from '@/lib/formats/arrays/structure';
import type { Series, SeriesWish } from '@/lib/formats/arrays/series';
import type { Problem } from '@/lib/kernel/problem';
import type { Result } from '@/lib/kernel/result';

/** What crosses to the thread: one file that it may read, and one question about it. */
export interface Hdf5Task {
  readonly path: string;
  /** As the sheet calls the file, for messages. */
  readonly file: string;
  readonly ask: { readonly kind: 'series'; readonly wish: SeriesWish } | { readonly kind: 'structure'; readonly format: ArrayStructure['format'] };
  readonly memoryBytes: number;
}

export type Hdf5Answer = Result<Series | ArrayStructure, Problem[]>;

/** Sent once all of the program that reads is there, before anything of the file is looked at. */
export const begins = 'begins';
export type Hdf5Message = typeof begins | Hdf5Answer;
