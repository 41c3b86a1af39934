import type { Element } from './sight-elements';
import type { ThinnedWeights } from './thinned-weights';

/** Products of all pairs of elements at the Chebyshev lags of one panel: interleaved re, im by [pair][node]. */
export interface LagPanel {
  readonly middle: number;
  readonly values: Float64Array;
}

export const NODES = 24;

/** Chebyshev points of the first kind on (−1, 1), and their barycentric weights. */
export const chebyshevPoints = Float64Array.from({ length: NODES }, (_, n) => Math.cos((Math.PI * (n + 0.5)) / NODES));
const barycentric = Float64Array.from({ length: NODES }, (_, n) => (n % 2 === 0 ? 1 : -1) * Math.sin((Math.PI * (n + 0.5)) / NODES));

/** Weights by which values at the points give the value at y; y may coincide with a point. */
export function interpolationWeights(y: number, into: Float64Array): void {
  let total = 0;
  for (let n = 0; n < NODES; n++) {
    const gap = y - chebyshevPoints[n]!;
    if (gap === 0) {
      into.fill(0);
      into[n] = 1;
      return;
    }
    into[n] = barycentric[n]! / gap;
    total += into[n]!;
  }
  for (let n = 0; n < NODES; n++) into[n] = into[n]! / total;
}

/** cos and sin of 2π·bin·x, [bin][node], taken anew at every bin. */
function turns(x: Float64Array, bins: Int32Array): { cos: Float64Array; sin: Float64Array } {
  const n = bins.length;
  const cos = new Float64Array(n * NODES);
  const sin = new Float64Array(n * NODES);
  for (let j = 0; j < n; j++) {
    for (let i = 0; i < NODES; i++) {
      const cycles = bins[j]! * x[i]!;
      const angle = 2 * Math.PI * (cycles - Math.round(cycles));
      cos[j * NODES + i] = Math.cos(angle);
      sin[j * NODES + i] = Math.sin(angle);
    }
  }
  return { cos, sin };
}

/** Adds Σ_j q_j e^{2πi·bin·x} at the nodes, or its conjugate, to `out`. */
function addSums(re: Float64Array, im: Float64Array, cos: Float64Array, sin: Float64Array, conjugate: boolean, out: Float64Array, at: number): void {
  const sumRe = new Float64Array(NODES);
  const sumIm = new Float64Array(NODES);
  const nodes = NODES;
  for (let j = 0; j < re.length; j++) {
    const [a, b, base] = [re[j]!, im[j]!, j * nodes];
    for (let i = 0; i < nodes; i++) {
      const [c, s] = [cos[base + i]!, sin[base + i]!];
      sumRe[i]! += a * c - b * s;
      sumIm[i]! += a * s + b * c;
    }
  }
  for (let i = 0; i < nodes; i++) {
    out[at + 2 * i]! += sumRe[i]!;
    out[at + 2 * i + 1]! += conjugate ? -sumIm[i]! : sumIm[i]!;
  }
}

/**
 * Direct sums over the bins of every pair's product at 24 lags of a panel.
 * Shape:  lags in cycles per bin, middle ± half.
 * Units:  those of the spectra, without 2 df.
 * Error:  between the lags as the polynomial of degree 23: 1e-12 where the content turns by less than 5 rad over the panel's half.
 * Fails:  never.
 * Source: ⟨a|b⟩ over both polarisations; Chebyshev interpolation, first barycentric form (from memory).
 */
export function lagPanel(a: readonly Element[], b: readonly Element[], weights: ThinnedWeights, middle: number, half: number): LagPanel {
  const { bins, values: v } = weights;
  const n = v.length;
  const { cos, sin } = turns(chebyshevPoints.map((y) => middle + half * y), bins);
  const values = new Float64Array(2 * a.length * b.length * NODES);
  const re = new Float64Array(n);
  const im = new Float64Array(n);
  a.forEach(({ spectrum: p }, j) =>
    b.forEach(({ spectrum: q }, k) => {
      const at = 2 * NODES * (j * b.length + k);
      const halves = [
        [p.zRe, p.zIm, q.zRe, q.zIm, false],
        [p.yRe, p.yIm, q.yRe, q.yIm, true],
      ] as const;
      for (const [ar, ai, br, bi, conjugate] of halves) {
        for (let i = 0; i < n; i++) {
          const bin = bins[i]!;
          re[i] = v[i]! * (ar[bin]! * br[bin]! + ai[bin]! * bi[bin]!);
          im[i] = v[i]! * (ai[bin]! * br[bin]! - ar[bin]! * bi[bin]!);
        }
        // Z_a(−f) Z_b(−f)* e^{−iωt} is the conjugate of Y_a Y_b* e^{iωt}.
        addSums(re, im, cos, sin, conjugate, values, at);
      }
    }),
  );
  return { middle, values };
}
