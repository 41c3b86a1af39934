import { evaluateSplines, fitSpline, splineBasis, type Spline } from '../routes/b/banded-spline';
import { gaussRule } from '../routes/b/gauss-legendre';
import { fallingZero, peakOnSplines } from '../tones/peak';
import { within, type Tone } from '../tones/tone';
import { SHARE_OF_PEAK, type RunCurves, type ThreeTones } from './run-curves';

const NODES_A_PANEL = 6;
const PANELS = { fewest: 12, most: 600, samples: 3 } as const;

const splined = (tone: Tone): readonly [Spline, Spline] => {
  const basis = splineBasis(tone.axis);
  return [fitSpline(basis, tone.re), fitSpline(basis, tone.im)];
};

/**
 * Route B: where the finest run falls below a tenth of its peak, on splines; the end given where it does not.
 * Shape:  one time.
 * Units:  M.
 * Error:  order 7 in the step.
 * Fails:  never.
 * Source: settings.md section 6.
 */
export function endOnSplines(finest: Tone, from: number, to: number): number {
  const inside = within(finest, from, to);
  const at = peakOnSplines(inside);
  if (at === null) return to;
  const curves = splined(inside);
  const power = (t: number): number => {
    const [re, im] = evaluateSplines(curves, Float64Array.of(t));
    return re![0]! ** 2 + im![0]! ** 2;
  };
  const floor = SHARE_OF_PEAK ** 2 * power(at);
  const i = inside.axis.findIndex((t, k) => t > at && inside.re[k]! ** 2 + inside.im[k]! ** 2 < floor);
  return i <= 0 ? to : fallingZero((t) => power(t) - floor, inside.axis[i - 1]!, inside.axis[i]!);
}

/** The beginning of the interval, with no weight, then Gauss nodes. */
function nodesOf(tones: ThreeTones, from: number, to: number): { readonly t: Float64Array; readonly w: Float64Array } {
  const inside = Math.max(...tones.map(({ axis }) => axis.filter((t) => t > from && t < to).length));
  const panels = Math.min(PANELS.most, Math.max(PANELS.fewest, Math.ceil(inside / PANELS.samples)));
  const rule = gaussRule(NODES_A_PANEL);
  const half = (to - from) / panels / 2;
  const t = new Float64Array(1 + panels * NODES_A_PANEL);
  const w = new Float64Array(t.length);
  t[0] = from;
  for (let i = 0; i < panels * NODES_A_PANEL; i++) {
    t[i + 1] = from + half * (2 * Math.floor(i / NODES_A_PANEL) + 1 + rule.x[i % NODES_A_PANEL]!);
    w[i + 1] = rule.w[i % NODES_A_PANEL]! / (2 * panels);
  }
  return { t, w };
}

interface Complex {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** Phase by which p runs ahead of q: −arg(p q*), followed from node to node. */
function ahead(p: Complex, q: Complex): Float64Array {
  const phase = new Float64Array(p.re.length);
  for (let i = 0; i < phase.length; i++) {
    const re = p.re[i]! * q.re[i]! + p.im[i]! * q.im[i]!;
    const im = p.im[i]! * q.re[i]! - p.re[i]! * q.im[i]!;
    const here = -Math.atan2(im, re);
    const before = i === 0 ? here : phase[i - 1]!;
    phase[i] = here + 2 * Math.PI * Math.round((before - here) / (2 * Math.PI));
  }
  return phase;
}

/**
 * Route B: the same differences from splines of the real and imaginary part at Gauss nodes; no phase of a run is unwrapped.
 * Shape:  see RunCurves.
 * Units:  rad, and those of the amplitudes.
 * Error:  order 7 in the step.
 * Fails:  never for an interval inside all three.
 * Source: Q20; settings.md section 6.
 */
export function curvesOnSplines(tones: ThreeTones, from: number, to: number): RunCurves {
  const { t, w } = nodesOf(tones, from, to);
  const [c, m, f] = tones.map((tone): Complex => {
    const [re, im] = evaluateSplines(splined(tone), t);
    return { re: re!, im: im! };
  }) as [Complex, Complex, Complex];
  const size = ({ re, im }: Complex): Float64Array => re.map((x, i) => Math.hypot(x, im[i]!));
  const between = (p: Float64Array, q: Float64Array): Float64Array => p.map((x, i) => x - q[i]!);
  const apart = (p: Complex, q: Complex): Float64Array => p.re.map((x, i) => Math.hypot(x - q.re[i]!, p.im[i]! - q.im[i]!));
  const [sc, sm, sf] = [size(c), size(m), size(f)];
  return { t, w, phase: [ahead(c, m), ahead(m, f)], amplitude: [between(sc, sm), between(sm, sf)], complex: [apart(c, m), apart(m, f)], finest: sf };
}
