/** Small steps through the bytes of a line; all of them stop at its newline. */
export const newline = 10;

export function join(a: Uint8Array, b: Uint8Array): Uint8Array {
  const both = new Uint8Array(a.length + b.length);
  both.set(a);
  both.set(b, a.length);
  return both;
}

export function skipBlanks(bytes: Uint8Array, from: number): number {
  let i = from;
  while (bytes[i] === 32 || bytes[i] === 9) i++;
  return i;
}

export function skipField(bytes: Uint8Array, from: number): number {
  let i = from;
  for (let c = bytes[i]!; c > 32 && c !== 44 && c !== 59; c = bytes[i]!) i++;
  return i;
}

export const isComment = (c: number): boolean => c === 35 || c === 37 || c === 33;

export function endOfLine(bytes: Uint8Array, from: number): number {
  const i = skipBlanks(bytes, from);
  const c = bytes[i]!;
  if (c === newline) return i + 1;
  if (c === 13 && bytes[i + 1] === newline) return i + 2;
  if (i > from && isComment(c)) return bytes.indexOf(newline, i) + 1;
  return -1;
}
