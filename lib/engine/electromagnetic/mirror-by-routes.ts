import { quadratureWeights } from '../radiation/local-calculus';
import { evaluateSplines, fitSpline, splineBasis } from '../routes/b/banded-spline';
import { gaussRule } from '../routes/b/gauss-legendre';
import { interpolatePair } from '../series/local-interpolation';
import { stretchOf, type Tone } from '../tones/tone';

/** A stretch of ψ₄'s times and the shift by which φ₂ is read. */
export interface MirrorWindow {
  readonly from: number;
  readonly to: number;
  readonly shiftM: number;
}

/** How alike two tones are: |φ₂|/|ψ₄| and the phase between them, over a stretch. */
export interface Likeness {
  readonly meanRatio: number;
  /** Standard deviation of the ratio over its mean. */
  readonly spread: number;
  /** Standard deviation of the phase between them, rad. */
  readonly phaseRms: number;
}

interface Compared {
  readonly ratio: Float64Array;
  readonly phase: Float64Array;
}

type Values = readonly [re: Float64Array, im: Float64Array];

/** |φ₂|/|ψ₄| and arg(φ₂ψ₄*) followed along ascending times. */
function compare([er, ei]: Values, [gr, gi]: Values): Compared {
  const ratio = new Float64Array(er.length);
  const phase = new Float64Array(er.length);
  for (let i = 0; i < er.length; i++) {
    ratio[i] = Math.hypot(er[i]!, ei[i]!) / Math.hypot(gr[i]!, gi[i]!);
    const here = Math.atan2(ei[i]! * gr[i]! - er[i]! * gi[i]!, er[i]! * gr[i]! + ei[i]! * gi[i]!);
    const before = i === 0 ? here : phase[i - 1]!;
    phase[i] = here + 2 * Math.PI * Math.round((before - here) / (2 * Math.PI));
  }
  return { ratio, phase };
}

function likenessOf(weights: Float64Array, { ratio, phase }: Compared): Likeness {
  const whole = weights.reduce((sum, w) => sum + w, 0);
  const mean = (values: (i: number) => number): number => weights.reduce((sum, w, i) => sum + w * values(i), 0) / whole;
  const [meanRatio, meanPhase] = [mean((i) => ratio[i]!), mean((i) => phase[i]!)];
  // Weights of high order may be negative: a spread of nothing but rounding must not become imaginary.
  const deviation = (values: Float64Array, level: number): number => Math.sqrt(Math.max(0, mean((i) => (values[i]! - level) ** 2)));
  return { meanRatio, spread: deviation(ratio, meanRatio) / meanRatio, phaseRms: deviation(phase, meanPhase) };
}

/** Samples beyond the window that interpolation may use. */
const MARGIN = 40;
const LEAST_POINTS = 65;

/**
 * Route A: both tones by local polynomials on a uniform grid over the window, sums with end weights.
 * Shape:  see Likeness.
 * Units:  M and rad.
 * Error:  of the stated order in the step.
 * Fails:  not finite where ψ₄ vanishes in the window.
 * Source: Q27; settings.md section 7.
 */
export function mirrorOnSamples(em: Tone, gw: Tone, { from, to, shiftM }: MirrorWindow, order: 6 | 8 = 8): Likeness {
  const inside = gw.axis.filter((t) => t >= from && t <= to).length;
  const n = Math.max(LEAST_POINTS, 2 * inside + 1);
  const dt = (to - from) / (n - 1);
  const read = (tone: Tone, t0: number): Values => {
    const near = stretchOf(tone, t0, t0 + (to - from), MARGIN);
    return interpolatePair({ axis: near.axis, first: near.re, second: near.im }, { t0, dt, n }, order);
  };
  const times = Float64Array.from({ length: n }, (_, i) => from + i * dt);
  return likenessOf(quadratureWeights(times, from, order, true), compare(read(em, from + shiftM), read(gw, from)));
}

const NODES_A_PANEL = 10;
const LEAST_PANELS = 12;

/**
 * Route B: both tones by splines of degree 7, sums by Gauss panels.
 * Shape:  see Likeness.
 * Units:  M and rad.
 * Error:  order 7 in the step.
 * Fails:  not finite where ψ₄ vanishes in the window.
 * Source: Q27; settings.md section 7.
 */
export function mirrorOnPanels(em: Tone, gw: Tone, { from, to, shiftM }: MirrorWindow): Likeness {
  const inside = gw.axis.filter((t) => t >= from && t <= to).length;
  const panels = Math.max(LEAST_PANELS, Math.ceil(inside / 4));
  const rule = gaussRule(NODES_A_PANEL);
  const half = (to - from) / panels / 2;
  const t = new Float64Array(panels * NODES_A_PANEL);
  const w = new Float64Array(t.length);
  for (let i = 0; i < t.length; i++) {
    t[i] = from + half * (2 * Math.floor(i / NODES_A_PANEL) + 1 + rule.x[i % NODES_A_PANEL]!);
    w[i] = half * rule.w[i % NODES_A_PANEL]!;
  }
  const read = (tone: Tone, at: Float64Array): Values => {
    const near = stretchOf(tone, at[0]!, at[at.length - 1]!, MARGIN);
    const basis = splineBasis(near.axis);
    const [re, im] = evaluateSplines([fitSpline(basis, near.re), fitSpline(basis, near.im)], at);
    return [re!, im!];
  };
  return likenessOf(w, compare(read(em, t.map((x) => x + shiftM)), read(gw, t)));
}
