/**
 * The draw of a number in a row, uniform in (0, 1): a Weyl counter through two multiplicative mixings (common practice), so
 * that any of a series can be had without those before it, and the same on every machine. Period 2³²; good to the third digit of a quantile.
 */
export function drawAt(seed: number, counter: number): number {
  let x = (seed + Math.imul(counter + 1, 0x9e3779b9)) >>> 0;
  x = Math.imul(x ^ (x >>> 16), 0x21f0aaad);
  x = Math.imul(x ^ (x >>> 15), 0x735a2d97);
  return (((x ^ (x >>> 15)) >>> 0) + 0.5) / 2 ** 32;
}
