import { quote } from '../text/diagnose-line';
import { elementOf, type ElementType, type NumberBase } from '../arrays/element-type';

export interface NpyHeader {
  readonly type: ElementType;
  readonly fortran: boolean;
  readonly shape: readonly number[];
  /** Where the numbers begin. */
  readonly dataAt: number;
}

/** What is wrong with a header, in the words of a `Problem`. */
export interface HeaderFault {
  readonly code: string;
  readonly saw: string;
  readonly expected: string;
  readonly hint?: string;
}

const magic = [0x93, 0x4e, 0x55, 0x4d, 0x50, 0x59];
const longestHeader = 2 ** 16;
const expectedFile = 'an .npy file of version 1, 2 or 3';
const fault = (saw: string, expected = expectedFile, hint?: string): HeaderFault => ({ code: 'formats/npy-header', saw, expected, ...(hint ? { hint } : {}) });

/** The header at the front of `bytes`; null when more bytes are needed to tell. */
export function parseHeader(bytes: Uint8Array): NpyHeader | HeaderFault | null {
  const wrong = magic.findIndex((m, i) => i < bytes.length && bytes[i] !== m);
  if (wrong >= 0) return fault('a file that does not begin as an .npy file does');
  if (bytes.length < 12) return null;
  const major = bytes[6]!;
  if (major < 1 || major > 3) return fault(`version ${major} of the format`);
  const view = new DataView(bytes.buffer, bytes.byteOffset);
  const length = major === 1 ? view.getUint16(8, true) : view.getUint32(8, true);
  const from = major === 1 ? 10 : 12;
  if (length > longestHeader) return fault(`a header of ${length} bytes`, `a header of at most ${longestHeader} bytes`);
  if (bytes.length < from + length) return null;
  const text = new TextDecoder(major === 3 ? 'utf-8' : 'latin1').decode(bytes.subarray(from, from + length));
  return parseFacts(text, from + length);
}

/** A Python literal with three entries; it is matched, never evaluated. */
function parseFacts(text: string, dataAt: number): NpyHeader | HeaderFault {
  const descr = /'descr'\s*:\s*('[^']{0,40}'|\[)/.exec(text)?.[1];
  const fortran = /'fortran_order'\s*:\s*(True|False)/.exec(text)?.[1];
  const shape = /'shape'\s*:\s*\(([\d\s,L]*)\)/.exec(text)?.[1];
  if (descr === undefined || fortran === undefined || shape === undefined) return fault(`the header ${quote(text.trim())}`, 'a header with descr, fortran_order and shape');
  const type = elementType(descr);
  if ('saw' in type) return type;
  const sizes = shape.split(',').map((part) => part.trim().replace(/L$/, '')).filter((part) => part !== '').map(Number);
  if (sizes.length > 3 || sizes.some((n) => !Number.isSafeInteger(n))) return fault(`the shape (${shape.trim()})`, 'one to three dimensions');
  return { type, fortran: fortran === 'True', shape: sizes, dataAt };
}

const numbers = /^'([<>=|])([fiuc])(\d{1,2})'$/;
const kinds = 'real or complex numbers (f2, f4, f8, c8, c16), or whole numbers';

function elementType(descr: string): ElementType | HeaderFault {
  if (descr === '[') return fault('an array of records', kinds, 'Save its fields as arrays of their own.');
  if (/O/.test(descr)) return { code: 'formats/npy-objects', saw: 'an array of Python objects, stored as a pickle', expected: kinds, hint: 'A pickle can run code while it is read, so it is never opened. Convert the array to numbers, for example with astype(float) or astype(complex), and save it again.' };
  const found = numbers.exec(descr);
  const [, order = '', kind = '', size = ''] = found ?? [];
  const complex = kind === 'c';
  const base = complex ? `f${Number(size) / 2}` : `${kind}${size}`;
  const allowed = complex ? /^f[48]$/.test(base) : /^(f[248]|[iu][1248])$/.test(base);
  if (!found || !allowed) return fault(`numbers of the type ${quote(descr.replace(/'/g, ''))}`, kinds, 'Convert the array, for example with astype(float), and save it again.');
  return elementOf(base as NumberBase, order !== '>', complex);
}
