/**
 * Series: numerics of sampled functions of one variable that know nothing of waves: end weights
 * of a sum, local interpolation, unwrapped polar form.
 */

/** B_{i+1}/(i+1) with B₁ = −½: what Euler and Maclaurin add to a sum that starts at 0, for the monomial yⁱ. */
const endMoments: readonly number[] = [-1 / 2, 1 / 12, 0, -1 / 120, 0, 1 / 252, 0, -1 / 240, 0, 1 / 132];

export interface EdgeRule {
  readonly order: number;
  /** First stencil point counted from the first sample inside the range. */
  readonly offset: number;
  /**
   * Weights to add at the stencil's samples when the edge lies `delta` (0 … 1) before the first sample inside:
   * ∫ from the edge = step × [Σ from the first sample inside + Σ_j weight_j g_j].
   */
  readonly weightsAt: (delta: number, out: Float64Array) => void;
  /** The same as polynomials in −delta: powers 0 … order of each sample's weight, sample after sample. */
  readonly powers: Float64Array;
}

/** Monomial coefficients of the cardinal polynomials on the nodes offset, offset + 1, … */
function cardinalPolynomials(order: number, offset: number): number[][] {
  return Array.from({ length: order }, (_, j) => {
    let poly = [1];
    for (let i = 0; i < order; i++) {
      if (i === j) continue;
      const node = offset + i;
      const next = new Array<number>(poly.length + 1).fill(0);
      poly.forEach((c, d) => {
        next[d + 1]! += c / (j - i);
        next[d]! -= (c * node) / (j - i);
      });
      poly = next;
    }
    return poly;
  });
}

function buildRule(order: number, offset: number): EdgeRule {
  const polys = cardinalPolynomials(order, offset);
  const constant = polys.map((poly) => poly.reduce((sum, c, i) => sum + c * endMoments[i]!, 0));
  // ∫ from −δ to 0 of a cardinal polynomial, as a polynomial in −δ; the same power of all of them side by side.
  const rising = new Float64Array(order * order);
  polys.forEach((poly, j) => poly.forEach((c, i) => (rising[order * i + j] = -c / (i + 1))));
  const weightsAt = (delta: number, out: Float64Array): void => {
    for (let j = 0; j < order; j++) out[j] = 0;
    for (let i = order - 1; i >= 0; i--) for (let j = 0; j < order; j++) out[j] = (out[j]! + rising[order * i + j]!) * -delta;
    for (let j = 0; j < order; j++) out[j]! += constant[j]!;
  };
  const powers = Float64Array.from({ length: order * (order + 1) }, (_, k) => {
    const [j, i] = [Math.floor(k / (order + 1)), k % (order + 1)];
    return i === 0 ? constant[j]! : rising[order * (i - 1) + j]!;
  });
  return { order, offset, weightsAt, powers };
}

const rules = new Map<number, EdgeRule>();

/**
 * Fractional end weights: they make a plain sum over samples an integral from an edge that lies between samples.
 * Shape:  `order` (≤ 9) samples from `offset` on; offset −order/2 is centred on the edge, 0 uses samples inside only.
 * Units:  none; multiply the whole sum by the step.
 * Error:  exact for polynomials below the order, so the error falls as step^(order+1) for a smooth integrand.
 * Fails:  never.
 * Source: Euler–Maclaurin with Bernoulli numbers; derivation here, identity checked on polynomials in the tests.
 */
export function edgeRule(order: number, offset: number): EdgeRule {
  const key = 16 * offset + order;
  const known = rules.get(key);
  if (known) return known;
  const made = buildRule(order, offset);
  rules.set(key, made);
  return made;
}
