import { spinWeightedHarmonic } from '../modes/spin-weighted-harmonic';
import { gaussRule } from '../routes/b/gauss-legendre';
import type { ComplexValues } from './news-on-panels';
import type { Vector } from './vector-integrals';

interface ModeOnNodes extends ComplexValues {
  readonly l: number;
  readonly m: number;
}

interface Ring {
  readonly cosine: number;
  readonly sine: number;
  readonly weight: number;
  /** ⁻²Y at azimuth 0, one number a mode. */
  readonly harmonics: Float64Array;
}

/** Gauss–Legendre rings and equal steps of azimuth that integrate n̂|ḣ|² exactly for modes up to ℓ. */
function ringsFor(modes: readonly ModeOnNodes[], lMax: number): Ring[] {
  const rule = gaussRule(lMax + 1);
  return Array.from(rule.x, (cosine, i) => {
    const inclination = Math.acos(cosine);
    const harmonics = Float64Array.from(modes, ({ l, m }) => spinWeightedHarmonic(l, m, inclination, 0).re);
    return { cosine, sine: Math.sqrt(1 - cosine * cosine), weight: rule.w[i]!, harmonics };
  });
}

/** e^{imφ} of every azimuth, m from −L to L. */
function wheel(lMax: number): { readonly cos: Float64Array[]; readonly sin: Float64Array[] } {
  const azimuths = Array.from({ length: 2 * lMax + 2 }, (_, k) => (2 * Math.PI * k) / (2 * lMax + 2));
  const turned = (f: (x: number) => number): Float64Array[] => azimuths.map((phi) => Float64Array.from({ length: 2 * lMax + 1 }, (_, i) => f((i - lMax) * phi)));
  return { cos: turned(Math.cos), sin: turned(Math.sin) };
}

export interface SphereTotals {
  readonly energy: number;
  readonly momentum: Vector;
}

/**
 * Route B: energy and momentum from ḣ itself, put together on a grid of directions at every time:
 * (1/16π)∮|ḣ|² dΩ and (1/16π)∮n̂|ḣ|² dΩ, summed over time.
 * Shape:  modes on the same nodes as the weights; m need not be complete.
 * Units:  weights in M; energy and momentum as fractions of M.
 * Error:  rounding: the rule is exact for the degrees that occur.
 * Fails:  never.
 * Source: Q14, the definition behind the sum over modes.
 */
export function totalsOnSphere(modes: readonly ModeOnNodes[], weights: Float64Array): SphereTotals {
  const lMax = Math.max(2, ...modes.map(({ l }) => l));
  const rings = ringsFor(modes, lMax);
  const { cos, sin } = wheel(lMax);
  const orders = [...new Set(modes.map(({ m }) => m + lMax))];
  const [re, im] = [new Float64Array(2 * lMax + 1), new Float64Array(2 * lMax + 1)];
  const step = (2 * Math.PI) / cos.length / (16 * Math.PI);
  const cosines = cos.map((row) => row[lMax + 1]!);
  const sines = sin.map((row) => row[lMax + 1]!);
  const total = [0, 0, 0, 0];
  for (let i = 0; i < weights.length; i++) {
    for (const ring of rings) {
      re.fill(0);
      im.fill(0);
      for (let k = 0; k < modes.length; k++) {
        const { m, re: a, im: b } = modes[k]!;
        re[m + lMax] = re[m + lMax]! + ring.harmonics[k]! * a[i]!;
        im[m + lMax] = im[m + lMax]! + ring.harmonics[k]! * b[i]!;
      }
      const size = weights[i]! * ring.weight * step;
      for (let p = 0; p < cos.length; p++) {
        const [c, s] = [cos[p]!, sin[p]!];
        let [x, y] = [0, 0];
        for (const o of orders) {
          x += re[o]! * c[o]! - im[o]! * s[o]!;
          y += re[o]! * s[o]! + im[o]! * c[o]!;
        }
        const power = size * (x * x + y * y);
        total[0]! += power;
        total[1]! += power * ring.sine * cosines[p]!;
        total[2]! += power * ring.sine * sines[p]!;
        total[3]! += power * ring.cosine;
      }
    }
  }
  return { energy: total[0]!, momentum: [total[1]!, total[2]!, total[3]!] };
}
