import { describe, expect, it } from 'vitest';
import { spinWeightedHarmonic } from '@/lib/engine/modes/spin-weighted-harmonic';

const pairs = [
  [2, 2],
  [2, -2],
  [2, 0],
  [3, 3],
  [3, -1],
  [4, 4],
  [4, 2],
  [8, -5],
  [12, 11],
] as const;

/** ∫ Y Y'* over the sphere by products of rules exact for these degrees. */
function product([l, m]: readonly [number, number], [p, q]: readonly [number, number]): { re: number; im: number } {
  const [rows, columns] = [400, 32];
  let [re, im] = [0, 0];
  for (let i = 0; i < rows; i++) {
    const iota = (Math.PI * (i + 0.5)) / rows;
    for (let j = 0; j < columns; j++) {
      const phi = (2 * Math.PI * j) / columns;
      const [y, z] = [spinWeightedHarmonic(l, m, iota, phi), spinWeightedHarmonic(p, q, iota, phi)];
      const area = (Math.PI / rows) * ((2 * Math.PI) / columns) * Math.sin(iota);
      re += area * (y.re * z.re + y.im * z.im);
      im += area * (y.im * z.re - y.re * z.im);
    }
  }
  return { re, im };
}

describe('the harmonics of spin weight −2', () => {
  it('give √(5/64π)(1 + cos ι)² e^{2iφ} for (2,2): 0.630783 face-on', () => {
    expect(spinWeightedHarmonic(2, 2, 0, 0).re).toAgreeWith(0.630783, 1e-6);
    const y = spinWeightedHarmonic(2, 2, 1.1, 0.4);
    const size = Math.sqrt(5 / (64 * Math.PI)) * (1 + Math.cos(1.1)) ** 2;
    expect(y.re).toAgreeWith(size * Math.cos(0.8), 1e-15);
    expect(y.im).toAgreeWith(size * Math.sin(0.8), 1e-15);
  });

  it('see only m = 2 face-on', () => {
    for (const [l, m] of pairs) {
      const y = spinWeightedHarmonic(l, m, 0, 0);
      if (m !== 2) expect(Math.hypot(y.re, y.im), `(${l},${m})`).toBe(0);
    }
    expect(Math.abs(spinWeightedHarmonic(4, 2, 0, 0).re)).toBeGreaterThan(0.5);
  });

  it('are orthonormal over the sphere', () => {
    for (const p of pairs) {
      for (const q of pairs) {
        const { re, im } = product(p, q);
        expect(re, `${p} with ${q}`).toAgreeWith(p === q ? 1 : 0, 1e-4);
        expect(im, `${p} with ${q}`).toAgreeWith(0, 1e-4);
      }
    }
  });

  it('give a mirror-symmetric binary one sign below its plane: Y_{l,−m}(π − ι) = (−1)^l Y*_{lm}(ι)', () => {
    for (const [l, m] of pairs) {
      const [y, z] = [spinWeightedHarmonic(l, m, 0.7, 0.3), spinWeightedHarmonic(l, -m, Math.PI - 0.7, 0.3)];
      const sign = l % 2 === 0 ? 1 : -1;
      expect(z.re).toAgreeWith(sign * y.re, 1e-13);
      expect(z.im).toAgreeWith(-sign * y.im, 1e-13);
    }
  });
});
