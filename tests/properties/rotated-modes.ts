import type { Mode } from '@/lib/engine/contract/waveform';

type Matrix = readonly (readonly [number, number, number])[];

const factorial = (n: number): number => (n < 2 ? 1 : n * factorial(n - 1));

/** Wigner's d^l_{m′m}(β), summed as in any table of it. */
function wigner(l: number, to: number, from: number, beta: number): number {
  const root = Math.sqrt(factorial(l + to) * factorial(l - to) * factorial(l + from) * factorial(l - from));
  let sum = 0;
  for (let s = Math.max(0, from - to); s <= Math.min(l + from, l - to); s++) {
    const below = factorial(l + from - s) * factorial(s) * factorial(to - from + s) * factorial(l - to - s);
    sum += ((to - from + s) % 2 === 0 ? 1 : -1) * (root / below) * Math.cos(beta / 2) ** (2 * l + from - to - 2 * s) * Math.sin(beta / 2) ** (to - from + 2 * s);
  }
  return sum;
}

/** The modes of the same field turned by R = R_z(α)R_y(β)R_z(γ): H′_{lm} = Σ e^{−imα} d^l_{mn}(β) e^{−inγ} H_{ln}. */
export function rotatedModes(modes: readonly Mode[], alpha: number, beta: number, gamma: number): Mode[] {
  return modes.map(({ l, m, re, im }) => {
    const turned = { l, m, re: new Float64Array(re.length), im: new Float64Array(im.length) };
    for (const other of modes.filter((mode) => mode.l === l)) {
      const size = wigner(l, m, other.m, beta);
      const angle = -m * alpha - other.m * gamma;
      const [c, s] = [size * Math.cos(angle), size * Math.sin(angle)];
      for (let i = 0; i < re.length; i++) {
        turned.re[i] = turned.re[i]! + c * other.re[i]! - s * other.im[i]!;
        turned.im[i] = turned.im[i]! + s * other.re[i]! + c * other.im[i]!;
      }
    }
    return turned;
  });
}

const product = (p: Matrix, q: Matrix): Matrix => p.map((row) => [0, 1, 2].map((j) => row[0] * q[0]![j]! + row[1] * q[1]![j]! + row[2] * q[2]![j]!) as [number, number, number]);

/** The same rotation of a vector. */
export function rotatedVector(v: readonly number[], alpha: number, beta: number, gamma: number): number[] {
  const z = (a: number): Matrix => [[Math.cos(a), -Math.sin(a), 0], [Math.sin(a), Math.cos(a), 0], [0, 0, 1]];
  const y: Matrix = [[Math.cos(beta), 0, Math.sin(beta)], [0, 1, 0], [-Math.sin(beta), 0, Math.cos(beta)]];
  return product(product(z(alpha), y), z(gamma)).map((row) => row[0] * v[0]! + row[1] * v[1]! + row[2] * v[2]!);
}
