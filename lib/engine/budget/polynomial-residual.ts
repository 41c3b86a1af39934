/**
 * What a least-squares polynomial leaves of a series, each sample counting alike; built from polynomials that are
 * orthogonal over the samples.
 * Shape:  parallel to the series.
 * Units:  those of the series.
 * Error:  rounding only.
 * Fails:  never; with fewer different abscissae than the degree asks for the rest is not finite.
 * Source: Forsythe 1957 (from memory).
 */
export function polynomialResidual(xs: Float64Array, ys: Float64Array, degree: number): Float64Array {
  const [first, last] = [xs[0]!, xs[xs.length - 1]!];
  const scaled = xs.map((x) => (2 * (x - first)) / (last - first) - 1);
  const rest = ys.slice();
  let before = new Float64Array(xs.length);
  let here = new Float64Array(xs.length).fill(1);
  let normBefore = 1;
  for (let k = 0; k <= degree; k++) {
    const norm = here.reduce((sum, p) => sum + p * p, 0);
    const coefficient = here.reduce((sum, p, i) => sum + p * rest[i]!, 0) / norm;
    const centre = here.reduce((sum, p, i) => sum + p * p * scaled[i]!, 0) / norm;
    const step = k === 0 ? 0 : norm / normBefore;
    const next = new Float64Array(xs.length);
    for (let i = 0; i < xs.length; i++) {
      rest[i] = rest[i]! - coefficient * here[i]!;
      next[i] = (scaled[i]! - centre) * here[i]! - step * before[i]!;
    }
    [before, here, normBefore] = [here, next, norm];
  }
  return rest;
}
