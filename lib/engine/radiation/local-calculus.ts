/** Weights of a derivative at x on arbitrary points, by Fornberg's recursion; row 0 interpolates, row 1 differentiates. */
function fornberg(x: number, axis: Float64Array, from: number, count: number, value: Float64Array, slope: Float64Array): void {
  value.fill(0, 0, count);
  slope.fill(0, 0, count);
  value[0] = 1;
  let product = 1;
  for (let i = 1; i < count; i++) {
    let next = 1;
    const here = axis[from + i]!;
    for (let j = 0; j < i; j++) {
      const gap = here - axis[from + j]!;
      next *= gap;
      if (j === i - 1) {
        const before = axis[from + i - 1]! - x;
        slope[i] = (product * (value[i - 1]! - before * slope[i - 1]!)) / next;
        value[i] = (-product * before * value[i - 1]!) / next;
      }
      slope[j] = ((here - x) * slope[j]! - value[j]!) / gap;
      value[j] = ((here - x) * value[j]!) / gap;
    }
    product = next;
  }
}

/** Where a stencil of `count` points around sample i begins; near the ends it is shorter, for long one-sided stencils amplify rounding. */
function stencilAt(i: number, n: number, wanted: number): readonly [from: number, count: number] {
  const oneSided = Math.min(wanted, 9, n);
  const half = (wanted - 1) / 2;
  if (i >= half && i + half < n) return [i - half, wanted];
  return [Math.max(0, Math.min(i - ((oneSided - 1) >> 1), n - oneSided)), oneSided];
}

function gainOf(slope: Float64Array, count: number): number {
  let gain = 0;
  for (let j = 0; j < count; j++) gain += slope[j]! * slope[j]!;
  return Math.sqrt(gain);
}

/** Weights of f(x + j) − f(x − j): on equal steps the two sides of a centred stencil mirror each other. */
const mirrored = (slope: Float64Array, half: number): Float64Array => Float64Array.from({ length: half }, (_, j) => (slope[half + 1 + j]! - slope[half - 1 - j]!) / 2);

/** A centred stencil at every sample from `first` to before `past`. */
function slideStencil(weights: Float64Array, samples: Float64Array, out: Float64Array, first: number, past: number): void {
  for (let i = first; i < past; i++) {
    let sum = 0;
    for (let j = 0; j < weights.length; j++) sum += weights[j]! * (samples[i + j + 1]! - samples[i - j - 1]!);
    out[i] = sum;
  }
}

/** The house's 13 points: each sample is read once for four slopes. Gives where it stopped, less than four samples before the end. */
function slideThirteen(weights: Float64Array, samples: Float64Array, out: Float64Array, first: number, past: number): number {
  const [u, v, w, x, y, z] = [weights[0]!, weights[1]!, weights[2]!, weights[3]!, weights[4]!, weights[5]!];
  let i = first;
  for (; i + 3 < past; i += 4) {
    const a = samples[i - 6]!;
    const b = samples[i - 5]!;
    const c = samples[i - 4]!;
    const d = samples[i - 3]!;
    const e = samples[i - 2]!;
    const f = samples[i - 1]!;
    const g = samples[i]!;
    const h = samples[i + 1]!;
    const k = samples[i + 2]!;
    const l = samples[i + 3]!;
    const m = samples[i + 4]!;
    const n = samples[i + 5]!;
    const o = samples[i + 6]!;
    const p = samples[i + 7]!;
    const q = samples[i + 8]!;
    const r = samples[i + 9]!;
    out[i] = u * (h - f) + v * (k - e) + w * (l - d) + x * (m - c) + y * (n - b) + z * (o - a);
    out[i + 1] = u * (k - g) + v * (l - f) + w * (m - e) + x * (n - d) + y * (o - c) + z * (p - b);
    out[i + 2] = u * (l - h) + v * (m - g) + w * (n - f) + x * (o - e) + y * (p - d) + z * (q - c);
    out[i + 3] = u * (m - k) + v * (n - h) + w * (o - g) + x * (p - f) + y * (q - e) + z * (r - d);
  }
  return i;
}

/**
 * First derivatives of several series at their own samples, by local polynomials.
 * Shape:  series parallel to the axis; the same arrays come back differentiated.
 * Units:  sample unit over axis unit.
 * Error:  order points − 1; 13 points: 3e-7 of the slope at ten samples a cycle, 1e-11 at 25.
 * Fails:  never for two samples or more.
 * Source: Fornberg 1988, Math. Comp. 51, 699 [from memory].
 */
export function derivativesAtSamples(axis: Float64Array, series: readonly Float64Array[], points: number, isEven = false): { slopes: Float64Array[]; noiseGain: Float64Array } {
  const n = axis.length;
  const slopes = series.map(() => new Float64Array(n));
  const noiseGain = new Float64Array(n);
  const value = new Float64Array(points);
  const slope = new Float64Array(points);
  const half = (points - 1) / 2;
  // On equal steps one centred stencil serves all.
  const [first, past] = isEven && n > 2 * half ? [half, n - half] : [n, n];
  if (past > first) {
    fornberg(axis[first]!, axis, 0, points, value, slope);
    noiseGain.fill(gainOf(slope, points), first, past);
    const weights = mirrored(slope, half);
    series.forEach((samples, s) => {
      const from = half === 6 ? slideThirteen(weights, samples, slopes[s]!, first, past) : first;
      slideStencil(weights, samples, slopes[s]!, from, past);
    });
  }
  for (let i = 0; i < n; i = i + 1 === first ? past : i + 1) {
    const [from, count] = stencilAt(i, n, points);
    fornberg(axis[i]!, axis, from, count, value, slope);
    noiseGain[i] = gainOf(slope, count);
    for (let s = 0; s < series.length; s++) {
      const samples = series[s]!;
      let sum = 0;
      for (let j = 0; j < count; j++) sum += slope[j]! * samples[from + j]!;
      slopes[s]![i] = sum;
    }
  }
  return { slopes, noiseGain };
}

/** Two-, three- and four-point Gauss rules on [0, 1]: exact for the local polynomials of order 4, 6 and 8. */
const GAUSS: Readonly<Record<number, readonly (readonly [x: number, w: number])[]>> = {
  4: [[0.21132486540518713, 0.5], [0.7886751345948129, 0.5]],
  6: [[0.1127016653792583, 5 / 18], [0.5, 8 / 18], [0.8872983346207417, 5 / 18]],
  8: [[0.06943184420297371, 0.17392742256872693], [0.33000947820757187, 0.32607257743127307], [0.6699905217924281, 0.32607257743127307], [0.9305681557970263, 0.17392742256872693]],
};

/**
 * Weight that each sample receives in ∫_{start}^{last}, for the local polynomial through so many samples around each interval.
 * Shape:  one weight a sample; zero everywhere for a start after the record.
 * Units:  those of the axis.
 * Error:  order `wanted` in the step; exact for polynomials below that degree.
 * Fails:  never for two samples or more.
 * Source: Gauss rules on Fornberg's interpolation; our assembly.
 */
export function quadratureWeights(axis: Float64Array, start: number, wanted: 4 | 6 | 8, isEven = false): Float64Array {
  const n = axis.length;
  const weights = new Float64Array(n);
  const points = Math.min(wanted, n);
  const share = new Float64Array(points);
  let inside = false;
  for (let i = 0; i + 1 < n; i++) {
    const low = Math.max(axis[i]!, start);
    const width = axis[i + 1]! - low;
    if (!(width > 0)) continue;
    const wantedFrom = i + 1 - (points >> 1);
    const from = Math.max(0, Math.min(wantedFrom, n - points));
    const centred = isEven && from === wantedFrom && low === axis[i]!;
    if (!(centred && inside)) intervalShares(axis, from, low, width, GAUSS[wanted]!, share);
    inside = centred;
    for (let j = 0; j < points; j++) weights[from + j] = weights[from + j]! + share[j]!;
  }
  return weights;
}

/** What each sample of a stencil receives of the integral over one interval. */
function intervalShares(axis: Float64Array, from: number, low: number, width: number, rule: readonly (readonly [number, number])[], share: Float64Array): void {
  const value = new Float64Array(share.length);
  const slope = new Float64Array(share.length);
  share.fill(0);
  for (const [x, w] of rule) {
    fornberg(low + x * width, axis, from, share.length, value, slope);
    for (let j = 0; j < share.length; j++) share[j] = share[j]! + w * width * value[j]!;
  }
}
