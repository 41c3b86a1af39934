import { derivativeOf, evaluateSplines, fitSpline, splineBasis, type Spline } from '../routes/b/banded-spline';
import { gaussRule } from '../routes/b/gauss-legendre';
import { interpolatePair } from '../series/local-interpolation';
import { polarOf } from '../series/polar';
import { stretchOf, type Tone } from '../tones/tone';
import type { Stretch } from './orbit-point';

const MARGIN_A = 8;
/** Spline end effects die by more than 10⁻¹² over so many samples. */
const MARGIN_B = 40;
const NODES_A_PANEL = 10;
const INTERVALS_A_PANEL = 4;

/**
 * Route A: advance of the phase between the exact edges of a stretch, by unwrapping the samples and
 * interpolating the unwrapped phase.
 * Shape:  one number, > 0 for house rotation.
 * Units:  times in M; rad.
 * Error:  of the interpolation, of the stated order in the step.
 * Fails:  not finite where the series vanishes at an edge.
 * Source: Q29.
 */
export function advanceOnSamples(whole: Tone, { from, to }: Stretch, order: 6 | 8 = 8): number {
  const { axis, re, im } = stretchOf(whole, from, to, MARGIN_A);
  const { phase, amplitude } = polarOf({ re, im });
  const phaseAt = (t: number): number => interpolatePair({ axis, first: phase, second: amplitude }, { t0: t, dt: 1, n: 1 }, order)[0][0]!;
  return phaseAt(from) - phaseAt(to);
}

/** A tone and its slope between the samples. */
export interface SplineTone {
  readonly values: readonly Spline[];
  readonly slopes: readonly Spline[];
}

export function splinesOver(whole: Tone, { from, to }: Stretch): { readonly tone: Tone; readonly splines: SplineTone } {
  const tone = stretchOf(whole, from, to, MARGIN_B);
  const basis = splineBasis(tone.axis);
  const values = [fitSpline(basis, tone.re), fitSpline(basis, tone.im)];
  return { tone, splines: { values, slopes: values.map(derivativeOf) } };
}

/** ω = −ℑ(Ḣ/H) at ascending times. */
export function frequencyBySplines({ values, slopes }: SplineTone, t: Float64Array): Float64Array {
  const [re, im] = evaluateSplines(values, t);
  const [dre, dim] = evaluateSplines(slopes, t);
  return t.map((_, i) => (im![i]! * dre![i]! - re![i]! * dim![i]!) / (re![i]! ** 2 + im![i]! ** 2));
}

export interface Nodes {
  readonly t: Float64Array;
  readonly w: Float64Array;
}

/**
 * Gauss panels over a stretch, some sample intervals each.
 * Shape:  nodes ascending, weights parallel to them.
 * Units:  M.
 * Error:  none of its own.
 * Fails:  never.
 * Source: Gauss–Legendre rules on panels (common practice).
 */
export function panelsOver({ axis }: Tone, { from, to }: Stretch): Nodes {
  const inside = axis.filter((t) => t > from && t < to).length;
  const panels = Math.max(8, Math.ceil(inside / INTERVALS_A_PANEL));
  const rule = gaussRule(NODES_A_PANEL);
  const half = (to - from) / panels / 2;
  const n = panels * NODES_A_PANEL;
  const place = (i: number): number => from + half * (2 * Math.floor(i / NODES_A_PANEL) + 1 + rule.x[i % NODES_A_PANEL]!);
  return { t: Float64Array.from({ length: n }, (_, i) => place(i)), w: Float64Array.from({ length: n }, (_, i) => half * rule.w[i % NODES_A_PANEL]!) };
}

/**
 * Route B: the same advance as the integral of −ℑ(Ḣ/H) over splines: no phase is unwrapped.
 * Shape:  one number, > 0 for house rotation.
 * Units:  times in M; rad.
 * Error:  of the spline's derivative, order 6 in the step.
 * Fails:  not finite where the series vanishes.
 * Source: Q29; definition of the phase.
 */
export function advanceOnPanels(whole: Tone, stretch: Stretch): number {
  const { tone, splines } = splinesOver(whole, stretch);
  const { t, w } = panelsOver(tone, stretch);
  return frequencyBySplines(splines, t).reduce((sum, omega, i) => sum + w[i]! * omega, 0);
}
