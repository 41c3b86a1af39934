import type { Problem } from '@/lib/kernel/problem';

/** Bytes of one file that a sheet names; injected, so that this room knows no disk and no network. */
export type OpenFile = (name: string) => AsyncIterable<Uint8Array>;

/** Thrown by an `OpenFile` that will not give a file, with the sentence for its owner. */
export class FileRefused extends Error {
  constructor(
    readonly saw: string,
    readonly expected: string,
    readonly hint?: string,
  ) {
    super(saw);
  }
}

/** Anything else that an `OpenFile` throws is reported without its message: that may name a path of the host. */
export function unreadable(file: string, thrown: unknown): Problem {
  if (thrown instanceof FileRefused)
    return { code: 'formats/unreadable', where: file, saw: thrown.saw, expected: thrown.expected, ...(thrown.hint ? { hint: thrown.hint } : {}) };
  const missing = thrown instanceof Error && 'code' in thrown && thrown.code === 'ENOENT';
  return missing
    ? { code: 'formats/file-missing', where: file, saw: 'no file of this name', expected: 'the file beside the claim sheet', hint: 'Add the file, or correct its name in the sheet.' }
    : { code: 'formats/unreadable', where: file, saw: 'a file that could not be read', expected: 'a readable file' };
}
