import { LARGEST_ORDER, type Spacings } from './richardson';

const STEPS = 80;
const CLOSE = 1e-15;

/** ln[(h₁^p − h₂^p)/(h₂^p − h₃^p)] with a = ln h₁/h₂ and b = ln h₂/h₃. */
const logRatio = (p: number, a: number, b: number): number => p * a + Math.log(-Math.expm1(-p * a)) - Math.log(-Math.expm1(-p * b));

/** How fast that logarithm grows with p. */
export const logRatioSlope = (p: number, a: number, b: number): number => a + a / Math.expm1(p * a) - b / Math.expm1(p * b);

/**
 * Route B: the same order by Newton's method on the logarithm of the ratio, which is nearly straight in p.
 * Shape:  one number.
 * Units:  spacings in any one unit.
 * Error:  rounding.
 * Fails:  NaN where no order between 0 and 20 shrinks differences by this ratio.
 * Source: Q20; settings.md section 6.
 */
export function orderByNewton(ratio: number, [h1, h2, h3]: Spacings): number {
  const [a, b] = [Math.log(h1 / h2), Math.log(h2 / h3)];
  const target = Math.log(ratio);
  const atZero = Math.log(a / b);
  if (!(a > 0 && b > 0 && target > atZero)) return Number.NaN;
  let p = (2 * (target - atZero)) / (a + b);
  for (let i = 0; i < STEPS; i++) {
    const next = p - (logRatio(p, a, b) - target) / logRatioSlope(p, a, b);
    const kept = next > 0 ? next : p / 2;
    if (Math.abs(kept - p) <= CLOSE * p) break;
    p = kept;
  }
  return p <= LARGEST_ORDER * (1 + CLOSE) ? p : Number.NaN;
}

/**
 * Route B: the limit as the weighted mean (k X₃ − X₂)/(k − 1) with k = (h₂/h₃)^p.
 * Shape:  one number from the two finest.
 * Units:  those of the values.
 * Error:  rounding.
 * Fails:  not finite for equal spacings or p = 0.
 * Source: Q20.
 */
export function limitByWeights(middle: number, finest: number, hMiddle: number, hFinest: number, order: number): number {
  const k = (hMiddle / hFinest) ** order;
  return (k * finest - middle) / (k - 1);
}
