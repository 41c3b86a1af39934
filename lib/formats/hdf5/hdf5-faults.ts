import type { Problem } from '@/lib/kernel/problem';
import { noMemory } from './dataset';

/** What the library threw, in a sentence of ours: its own text names paths of the machine it was built on. */
export function faultOf(thrown: unknown, where: string, reachedFor: readonly string[]): Problem {
  const message = thrown instanceof Error ? thrown.message : String(thrown);
  if (reachedFor.length > 0)
    return { code: 'formats/hdf5-outside', where, saw: 'a link to another file, or numbers stored in one', expected: 'numbers stored in the file itself', hint: 'Copy everything into one file, for example with h5repack, and attach that.' };
  if (/file signature not found/.test(message)) return { code: 'formats/hdf5-not', where, saw: 'a file that does not begin as an HDF5 file does', expected: 'an HDF5 file', hint: 'Check that the right file is attached.' };
  if (/truncated file/.test(message)) return { code: 'formats/hdf5-damaged', where, saw: 'a file that ends before its own stated end', expected: 'a whole HDF5 file', hint: 'Send the file again; it was cut short.' };
  if (/too many links|too many soft links/i.test(message)) return { code: 'formats/hdf5-links', where, saw: 'links that lead in a circle', expected: 'a path that ends in a dataset' };
  if (/unable to determine if .* exist/.test(message)) return { code: 'formats/hdf5-links', where, saw: 'a link that leads nowhere', expected: 'a path that ends in a dataset' };
  if (/memory|alloc/i.test(message) && !/out of bounds/.test(message)) return noMemory(where);
  return { code: 'formats/hdf5-damaged', where, saw: 'a part of the file that cannot be read', expected: 'a whole HDF5 file', hint: 'Write the file again, or send it again if it may have been damaged on the way.' };
}
