import { describe, expect, it } from 'vitest';
import { readBins, realTransform } from '@/lib/engine/fourier/real-transform';
import { transformOfSize } from '@/lib/engine/fourier/transform';
import { zoomTransform } from '@/lib/engine/fourier/zoom-transform';
import { seededRandom } from '../../../support/seeded-random';

const random = seededRandom(7);
const series = (n: number): Float64Array => Float64Array.from({ length: 2 * n }, () => random() - 0.5);

function directly(samples: Float64Array, firstIndex: number, theta: number, k: number): [number, number] {
  let [re, im] = [0, 0];
  for (let j = 0; j < samples.length / 2; j++) {
    const angle = -2 * Math.PI * ((k * (firstIndex + j) * theta) % 1);
    re += samples[2 * j]! * Math.cos(angle) - samples[2 * j + 1]! * Math.sin(angle);
    im += samples[2 * j]! * Math.sin(angle) + samples[2 * j + 1]! * Math.cos(angle);
  }
  return [re, im];
}

describe('the transforms', () => {
  it('keep the power of a series (Parseval, T12) and come back to it', () => {
    const n = 4096;
    const [data, out, back] = [series(n), new Float64Array(2 * n), new Float64Array(2 * n)];
    transformOfSize(n).forward(out, data);
    const power = (x: Float64Array) => x.reduce((sum, v) => sum + v * v, 0);
    expect(power(out) / n).toAgreeWith(power(data), { relative: 1e-13 });
    transformOfSize(n).inverse(back, out);
    expect(Math.max(...back.map((v, i) => Math.abs(v - data[i]!)))).toBeLessThan(1e-14);
  });

  it('refuse a size that is no power of two', () => {
    expect(() => transformOfSize(12)).toThrow();
  });

  it.each([
    { n: 1000, origin: 930, size: 1024 },
    { n: 1024, origin: 0, size: 1024 },
    { n: 300, origin: 17, size: 2048 },
  ])('read the bins of a real series where they are asked for: $n samples, $size bins', ({ n, origin, size }) => {
    const values = Float64Array.from({ length: n }, () => random() - 0.5);
    const samples = Float64Array.from({ length: 2 * n }, (_, i) => (i % 2 === 0 ? values[i / 2]! : 0));
    const bins = realTransform(values, origin, size);
    const [first, step, count] = [1, 3, Math.floor((size / 2 - 2) / 3) + 1];
    const [re, im] = [new Float64Array(count), new Float64Array(count)];
    readBins(bins, first, step, count, re, im);
    for (let i = 0; i < count; i += 11) {
      const [x, y] = directly(samples, -origin, 1 / size, first + i * step);
      expect(re[i]).toAgreeWith(x, 1e-11);
      expect(im[i]).toAgreeWith(y, 1e-11);
    }
  });

  it.each([
    { n: 300, firstIndex: -120, theta: 0.000731, firstBin: -55, bins: 111 },
    { n: 1000, firstIndex: 0, theta: 1 / 4096, firstBin: 900, bins: 40 },
    { n: 300, firstIndex: -290, theta: 1 / 31234.567, firstBin: -9000, bins: 15000 },
    { n: 77, firstIndex: 1e6, theta: 1.234567e-5, firstBin: 3, bins: 9 },
  ])('zoom to any bins as a direct sum does: $n samples, spacing $theta', ({ n, ...request }) => {
    const samples = series(n);
    const bins = zoomTransform({ samples, ...request });
    for (let b = 0; b < request.bins; b += Math.max(7, Math.ceil(request.bins / 500))) {
      const [re, im] = directly(samples, request.firstIndex, request.theta, request.firstBin + b);
      expect(bins[2 * b]).toAgreeWith(re, 1e-11);
      expect(bins[2 * b + 1]).toAgreeWith(im, 1e-11);
    }
  });
});
