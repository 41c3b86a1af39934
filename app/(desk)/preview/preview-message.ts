import type { Problem } from '@/lib/kernel/problem';
import type { SheetGuess } from '@/lib/pipeline/guesses/sheet-guess';
import type { Preview } from '@/lib/pipeline/preview';

/** A file under the name by which the sheet calls it. */
export interface NamedFile {
  readonly name: string;
  readonly file: Blob;
}

/** What the worker is given: a sheet with its files, or one archive that holds both. Blobs are handles; nothing is copied. */
export type PreviewAsk =
  | { readonly kind: 'files'; readonly sheet: unknown; readonly files: readonly NamedFile[] }
  /** What the files say of the words beside them; claims are not looked at. */
  | { readonly kind: 'guess'; readonly sheet: unknown; readonly files: readonly NamedFile[] }
  | { readonly kind: 'archive'; readonly name: string; readonly archive: Blob };

export type PreviewNote =
  | { readonly kind: 'progress'; readonly fraction: number; readonly doing: string }
  | { readonly kind: 'done'; readonly preview: Preview }
  | { readonly kind: 'guessed'; readonly guesses: readonly SheetGuess[] }
  | { readonly kind: 'refused'; readonly problems: readonly Problem[] };
