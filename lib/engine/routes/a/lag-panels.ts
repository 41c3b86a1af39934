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

/** Nodes lie in pairs about the middle. */
const PAIRS = NODES / 2;

interface Turns {
  /** Of each bin at the middle of the panel. */
  readonly midCos: Float64Array;
  readonly midSin: Float64Array;
  /** Of each bin from the middle to the upper node of each pair, [bin][pair]. */
  readonly cos: Float64Array;
  readonly sin: Float64Array;
}

/** cos and sin of 2π·bin·x, taken anew at every bin. */
function turns(middle: number, half: number, bins: Int32Array): Turns {
  const n = bins.length;
  const made = { midCos: new Float64Array(n), midSin: new Float64Array(n), cos: new Float64Array(n * PAIRS), sin: new Float64Array(n * PAIRS) };
  const angleOf = (cycles: number): number => 2 * Math.PI * (cycles - Math.round(cycles));
  for (let j = 0; j < n; j++) {
    const mid = angleOf(bins[j]! * middle);
    made.midCos[j] = Math.cos(mid);
    made.midSin[j] = Math.sin(mid);
    for (let i = 0; i < PAIRS; i++) {
      const angle = angleOf(bins[j]! * half * chebyshevPoints[i]!);
      made.cos[j * PAIRS + i] = Math.cos(angle);
      made.sin[j * PAIRS + i] = Math.sin(angle);
    }
  }
  return made;
}

/** One pair of elements, bin by bin and turned to the middle: sums and differences of what lies at f and at −f. */
interface Folded {
  readonly sumRe: Float64Array;
  readonly sumIm: Float64Array;
  readonly gapRe: Float64Array;
  readonly gapIm: Float64Array;
}

const foldedOf = (n: number): Folded => ({ sumRe: new Float64Array(n), sumIm: new Float64Array(n), gapRe: new Float64Array(n), gapIm: new Float64Array(n) });

/** Z_a(−f) Z_b(−f)* e^{−iωt} is the conjugate of Y_a Y_b* e^{iωt}. */
function fold(p: Element['spectrum'], q: Element['spectrum'], { bins, values: v }: ThinnedWeights, { midCos, midSin }: Turns, out: Folded): void {
  for (let i = 0; i < bins.length; i++) {
    const bin = bins[i]!;
    const [w, c, s] = [v[i]!, midCos[i]!, midSin[i]!];
    const zRe = w * (p.zRe[bin]! * q.zRe[bin]! + p.zIm[bin]! * q.zIm[bin]!);
    const zIm = w * (p.zIm[bin]! * q.zRe[bin]! - p.zRe[bin]! * q.zIm[bin]!);
    const yRe = w * (p.yRe[bin]! * q.yRe[bin]! + p.yIm[bin]! * q.yIm[bin]!);
    const yIm = w * (p.yIm[bin]! * q.yRe[bin]! - p.yRe[bin]! * q.yIm[bin]!);
    const [a, b] = [zRe * c - zIm * s, zRe * s + zIm * c];
    const [d, e] = [yRe * c - yIm * s, yRe * s + yIm * c];
    out.sumRe[i] = a + d;
    out.sumIm[i] = b + e;
    out.gapRe[i] = a - d;
    out.gapIm[i] = b - e;
  }
}

/** Σ over the bins at both nodes of each pair: what turns one way at the upper node turns the other way at the lower. */
function putSums({ sumRe, sumIm, gapRe, gapIm }: Folded, { cos, sin }: Turns, n: number, out: Float64Array, at: number): void {
  const [evenRe, oddRe, evenIm, oddIm] = [new Float64Array(PAIRS), new Float64Array(PAIRS), new Float64Array(PAIRS), new Float64Array(PAIRS)];
  const pairs = PAIRS;
  for (let j = 0; j < n; j++) {
    const [a, b, d, e, base] = [sumRe[j]!, sumIm[j]!, gapRe[j]!, gapIm[j]!, j * pairs];
    for (let i = 0; i < pairs; i++) {
      const c = cos[base + i]!;
      const s = sin[base + i]!;
      evenRe[i]! += a * c;
      oddRe[i]! += b * s;
      evenIm[i]! += e * c;
      oddIm[i]! += d * s;
    }
  }
  for (let i = 0; i < pairs; i++) {
    const lower = at + 2 * (NODES - 1 - i);
    out[at + 2 * i] = evenRe[i]! - oddRe[i]!;
    out[at + 2 * i + 1] = evenIm[i]! + oddIm[i]!;
    out[lower] = evenRe[i]! + oddRe[i]!;
    out[lower + 1] = evenIm[i]! - oddIm[i]!;
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
  const n = weights.values.length;
  const turned = turns(middle, half, weights.bins);
  const values = new Float64Array(2 * a.length * b.length * NODES);
  const folded = foldedOf(n);
  a.forEach(({ spectrum: p }, j) =>
    b.forEach(({ spectrum: q }, k) => {
      fold(p, q, weights, turned, folded);
      putSums(folded, turned, n, values, 2 * NODES * (j * b.length + k));
    }),
  );
  return { middle, values };
}
