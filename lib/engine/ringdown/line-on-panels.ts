import { derivativeOf, evaluateSplines, fitSpline, splineBasis } from '../routes/b/banded-spline';
import { gaussRule } from '../routes/b/gauss-legendre';
import { stretchOf, type Tone } from '../tones/tone';
import type { RingdownLine } from './line-on-samples';

/** Spline end effects die by more than 10⁻¹² over so many samples. */
const MARGIN = 40;
const NODES_A_PANEL = 10;
const LEAST_PANELS = 8;

/**
 * Route B: the slope of a least-squares line is the mean of the local slope under a parabola,
 * ∫ ẏ 6(t−a)(b−t)/(b−a)³ dt, and the local slopes of ln|H| and phase are real and imaginary part of
 * Ḣ/H. So neither logarithm nor unwrapped phase is taken: splines, their derivative, Gauss panels.
 * Shape:  two slopes.
 * Units:  times in M; rad/M and 1/M.
 * Error:  of the spline's derivative, order 6 in the step.
 * Fails:  slopes are not finite where the series vanishes within the window.
 * Source: integration by parts of the normal equation; our derivation.
 */
export function lineOnPanels(whole: Tone, from: number, to: number): RingdownLine {
  const tone = stretchOf(whole, from, to, MARGIN);
  const basis = splineBasis(tone.axis);
  const values = [fitSpline(basis, tone.re), fitSpline(basis, tone.im)];
  const slopes = values.map(derivativeOf);
  const inside = tone.axis.filter((t) => t > from && t < to).length;
  const panels = Math.max(LEAST_PANELS, Math.ceil(inside / 4));
  const rule = gaussRule(NODES_A_PANEL);
  const length = to - from;
  const half = length / panels / 2;
  const t = new Float64Array(panels * NODES_A_PANEL);
  for (let i = 0; i < t.length; i++) t[i] = from + half * (2 * Math.floor(i / NODES_A_PANEL) + 1 + rule.x[i % NODES_A_PANEL]!);
  const [re, im] = evaluateSplines(values, t);
  const [dre, dim] = evaluateSplines(slopes, t);
  let [growth, turn] = [0, 0];
  for (let i = 0; i < t.length; i++) {
    const power = re![i]! * re![i]! + im![i]! * im![i]!;
    const weight = (half * rule.w[i % NODES_A_PANEL]! * 6 * (t[i]! - from) * (to - t[i]!)) / length ** 3 / power;
    growth += weight * (re![i]! * dre![i]! + im![i]! * dim![i]!);
    turn += weight * (re![i]! * dim![i]! - im![i]! * dre![i]!);
  }
  return { omega: -turn, gamma: -growth };
}
