/** The seed in words as 32 bits, by FNV-1a. */
export function seedOf(text: string): number {
  let hash = 0x811c9dc5;
  for (const letter of text) hash = Math.imul(hash ^ letter.codePointAt(0)!, 0x01000193);
  return hash >>> 0;
}

/**
 * The draw of a number in a row, in (0, 1): a counter through two mixings, so that any of a series can be had without
 * those before it, and the same on every machine.
 */
export function drawAt(seed: number, counter: number): number {
  let x = (seed + Math.imul(counter + 1, 0x9e3779b9)) >>> 0;
  x = Math.imul(x ^ (x >>> 16), 0x21f0aaad);
  x = Math.imul(x ^ (x >>> 15), 0x735a2d97);
  return (((x ^ (x >>> 15)) >>> 0) + 0.5) / 2 ** 32;
}
