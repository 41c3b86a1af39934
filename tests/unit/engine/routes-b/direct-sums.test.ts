import { describe, expect, it } from 'vitest';
import { pairTransform } from '@/lib/engine/routes/b/block-fourier';
import { edgeCorrection, taylorThrough } from '@/lib/engine/routes/b/edge-correction';
import { gaussRule } from '@/lib/engine/routes/b/gauss-legendre';
import { seededRandom } from '../../../support/seeded-random';

const plainSum = (values: Float64Array, step: number, f: number): readonly [number, number] => {
  let [re, im] = [0, 0];
  values.forEach((v, i) => {
    const angle = -2 * Math.PI * f * step * (i - (values.length - 1) / 2);
    re += step * v * Math.cos(angle);
    im += step * v * Math.sin(angle);
  });
  return [re, im];
};

describe('blocked Fourier sums', () => {
  it.each([1, 7, 100, 1501, 4096])('equal plain sums of %i samples at scattered frequencies', (n) => {
    const random = seededRandom(n);
    const x = Float64Array.from({ length: n }, () => random() - 0.5);
    const y = Float64Array.from({ length: n }, () => random() - 0.5);
    const step = 0.01;
    const f = Float64Array.from({ length: 400 }, () => 50 * random()).sort();
    const sums = pairTransform({ step, x, y }, f);
    const scale = step * Math.sqrt(n);
    for (let k = 0; k < f.length; k += 7) {
      const [re, im] = plainSum(x, step, f[k]!);
      expect(sums.xRe[k]).toAgreeWith(re, { absolute: 1e-12 * scale });
      expect(sums.xIm[k]).toAgreeWith(im, { absolute: 1e-12 * scale });
      expect(sums.yRe[k]).toAgreeWith(plainSum(y, step, f[k]!)[0], { absolute: 1e-12 * scale });
    }
  });
});

describe('Gauss–Legendre rules', () => {
  it.each([1, 2, 5, 12, 35])('of order %i integrate every polynomial of degree 2n − 1', (n) => {
    const { x, w } = gaussRule(n);
    for (let degree = 0; degree < 2 * n; degree++) {
      const sum = x.reduce((total, xi, i) => total + w[i]! * xi ** degree, 0);
      expect(sum).toAgreeWith(degree % 2 === 0 ? 2 / (degree + 1) : 0, { absolute: 2e-14 });
    }
  });
});

/** Sum with edge correction of e^{−γt} from t = 0 on points that start `offset` steps later. */
function halfLine(gamma: number, theta: number, offset: number): readonly [number, number] {
  const n = 4000;
  let [re, im] = [0, 0];
  for (let j = 0; j < n; j++) {
    const size = Math.exp(-gamma * (j + offset));
    re += size * Math.cos(theta * (j + offset));
    im -= size * Math.sin(theta * (j + offset));
  }
  const u = Float64Array.from({ length: 8 }, (_, i) => i / 4);
  const taylor = taylorThrough(u, u.map((t) => Math.exp(-gamma * t)));
  const out = new Float64Array(4);
  edgeCorrection({ at: 0, inward: 1, offset, x: taylor, y: new Float64Array(8) })(theta, out);
  return [re + out[0]!, im + out[1]!];
}

describe('the correction at a sharp edge', () => {
  it.each([0, 0.25, 0.6, 0.999])('turns the sum of a decaying exponential into its integral, first point %f steps inside', (offset) => {
    for (const theta of [0, 0.01, 0.5, 1.5, 2.2]) {
      const gamma = 0.05;
      const size = gamma * gamma + theta * theta;
      const [re, im] = halfLine(gamma, theta, offset);
      expect(re).toAgreeWith(gamma / size, { absolute: 1e-9 });
      expect(im).toAgreeWith(-theta / size, { absolute: 1e-9 });
    }
  });

  it('is the trapezoid’s half weight when nothing oscillates and the function is constant', () => {
    const out = new Float64Array(4);
    edgeCorrection({ at: 0, inward: 1, offset: 0, x: Float64Array.from([1, 0, 0, 0, 0, 0, 0, 0]), y: new Float64Array(8) })(0, out);
    expect(out[0]).toAgreeWith(-0.5, 1e-15);
  });
});
