import { derivativeOf, evaluateSplines, fitSpline, splineBasis, type Spline } from '../routes/b/banded-spline';
import { gaussRule } from '../routes/b/gauss-legendre';
import { fallingZero, peakOnSplines } from '../tones/peak';
import { within, type Tone } from '../tones/tone';
import { FLAT_RAD, type PairRoute } from './alignment';

const NODES_A_PANEL = 8;
const PANELS = { fewest: 12, most: 500, mostInSearch: 200, samples: 3 } as const;
/** Lags tried before Newton's method: another spacing than route A's. */
const LAGS = { aWindow: 11, fewest: 30, most: 400 } as const;
const NEWTON_STEPS = 40;

interface Splined {
  readonly tone: Tone;
  readonly values: readonly [Spline, Spline];
  readonly slopes: readonly [Spline, Spline];
}

function splined(tone: Tone): Splined {
  const basis = splineBasis(tone.axis);
  const [re, im] = [fitSpline(basis, tone.re), fitSpline(basis, tone.im)];
  return { tone, values: [re, im], slopes: [derivativeOf(re), derivativeOf(im)] };
}

interface Nodes {
  readonly t: Float64Array;
  /** Adding up to one. */
  readonly w: Float64Array;
}

function windowNodes({ axis }: Tone, [from, to]: readonly [number, number], most: number = PANELS.most): Nodes {
  const inside = axis.filter((t) => t > from && t < to).length;
  const panels = Math.min(most, Math.max(PANELS.fewest, Math.ceil(inside / PANELS.samples)));
  const rule = gaussRule(NODES_A_PANEL);
  const half = (to - from) / panels / 2;
  const t = new Float64Array(panels * NODES_A_PANEL);
  const w = new Float64Array(t.length);
  for (let i = 0; i < t.length; i++) {
    t[i] = from + half * (2 * Math.floor(i / NODES_A_PANEL) + 1 + rule.x[i % NODES_A_PANEL]!);
    w[i] = rule.w[i % NODES_A_PANEL]! / (2 * panels);
  }
  return { t, w };
}

/** −arg(H_b H_a*) followed along ascending nodes, and |H_b|/|H_a|. */
function differences(a: Splined, b: Splined, t: Float64Array, shift: number): { readonly phase: Float64Array; readonly ratio: Float64Array } {
  const [ar, ai] = evaluateSplines(a.values, t);
  const [br, bi] = evaluateSplines(b.values, t.map((x) => x + shift));
  const phase = new Float64Array(t.length);
  const ratio = new Float64Array(t.length);
  for (let i = 0; i < t.length; i++) {
    const re = br![i]! * ar![i]! + bi![i]! * ai![i]!;
    const im = bi![i]! * ar![i]! - br![i]! * ai![i]!;
    const here = -Math.atan2(im, re);
    const before = i === 0 ? here : phase[i - 1]!;
    phase[i] = here + 2 * Math.PI * Math.round((before - here) / (2 * Math.PI));
    ratio[i] = Math.hypot(br![i]!, bi![i]!) / Math.hypot(ar![i]!, ai![i]!);
  }
  return { phase, ratio };
}

/** φ̇ = −Im(Ḣ/H) at ascending times. */
function frequency({ values, slopes }: Splined, t: Float64Array): Float64Array {
  const [re, im] = evaluateSplines(values, t);
  const [dre, dim] = evaluateSplines(slopes, t);
  return t.map((_, i) => (im![i]! * dre![i]! - re![i]! * dim![i]!) / (re![i]! ** 2 + im![i]! ** 2));
}

const mean = (w: Float64Array, x: Float64Array): number => x.reduce((sum, value, i) => sum + w[i]! * value, 0);

function costAt(a: Splined, b: Splined, { t, w }: Nodes, shift: number): { readonly variance: number; readonly slope: number; readonly spread: number } {
  const { phase } = differences(a, b, t, shift);
  const omega = frequency(b, t.map((x) => x + shift));
  const [level, rate] = [mean(w, phase), mean(w, omega)];
  let [variance, slope, spread] = [0, 0, 0];
  for (let i = 0; i < t.length; i++) {
    const [left, bent] = [phase[i]! - level, omega[i]! - rate];
    variance += w[i]! * left * left;
    slope += w[i]! * left * bent;
    spread += w[i]! * bent * bent;
  }
  return { variance, slope, spread };
}

function bestShift(a: Splined, b: Splined, window: readonly [number, number], low: number, high: number): { shift: number; degenerate: boolean } {
  const nodes = windowNodes(a.tone, window);
  const fewer = windowNodes(a.tone, window, PANELS.mostInSearch);
  const rough = (shift: number): number => costAt(a, b, fewer, shift).variance;
  const cost = (shift: number) => costAt(a, b, nodes, shift);
  const length = window[1] - window[0];
  const lags = Math.min(LAGS.most, Math.max(LAGS.fewest, Math.ceil(((high - low) / length) * LAGS.aWindow)));
  const zero = Math.min(Math.max(0, low), high);
  let [shift, least] = [zero, rough(zero)];
  for (let i = 0; i <= lags; i++) {
    const at = low + ((high - low) * i) / lags;
    const here = rough(at);
    if (here < least) [shift, least] = [at, here];
  }
  if (Math.sqrt(cost(shift).spread) * length < FLAT_RAD) return { shift: zero, degenerate: true };
  for (let pass = 0; pass < NEWTON_STEPS; pass++) {
    const { slope, spread } = cost(shift);
    const next = Math.min(Math.max(shift - slope / spread, low), high);
    if (Math.abs(next - shift) < 1e-14 * length) break;
    shift = next;
  }
  return { shift, degenerate: false };
}

function reached(of: Splined, wanted: number): number | null {
  const { axis } = of.tone;
  const i = frequency(of, axis).findIndex((w) => w >= wanted);
  return i <= 0 ? null : fallingZero((t) => wanted - frequency(of, Float64Array.of(t))[0]!, axis[i - 1]!, axis[i]!);
}

/** Steps from one time to another, three to a sample of the finer record, ends included. */
function pathBetween({ axis }: Tone, from: number, to: number): Float64Array {
  const [low, high] = [Math.min(from, to), Math.max(from, to)];
  const n = 3 * (axis.filter((t) => t > low && t < high).length + 4);
  return Float64Array.from({ length: n + 1 }, (_, i) => low + ((high - low) * i) / n);
}

/** Phases followed through a path, whole turns chosen so that the anchor has its principal value. */
function anchored(a: Splined, b: Splined, shift: number, anchor: number, t: Float64Array): { readonly phase: Float64Array; readonly ratio: Float64Array } {
  const principal = differences(a, b, Float64Array.of(anchor), shift).phase[0]!;
  const atEnd = anchor <= t[0]! ? t[0]! : t[t.length - 1]!;
  const bridge = pathBetween(a.tone, anchor, atEnd);
  const over = differences(a, b, bridge, shift).phase;
  const [fromAnchor, toPath] = anchor <= t[0]! ? [over[0]!, over[over.length - 1]!] : [over[over.length - 1]!, over[0]!];
  const { phase, ratio } = differences(a, b, t, shift);
  const start = anchor <= t[0]! ? phase[0]! : phase[phase.length - 1]!;
  const turns = 2 * Math.PI * Math.round((toPath - fromAnchor + principal - start) / (2 * Math.PI));
  return { phase: phase.map((x) => x + turns), ratio };
}

/**
 * Route B of a pair.
 * Shape:  see PairRoute.
 * Units:  M and rad.
 * Error:  order 7 in the step, in the real and imaginary part.
 * Fails:  never; see PairRoute for what is null.
 * Source: Q19; settings.md section 6.
 */
export function pairOnSplines(toneA: Tone, toneB: Tone): PairRoute {
  const [a, b] = [splined(toneA), splined(toneB)];
  const ends = ({ axis }: Tone): readonly [number, number] => [axis[0]!, axis[axis.length - 1]!];
  const [[firstA, lastA], [firstB, lastB]] = [ends(toneA), ends(toneB)];
  return {
    firstA, lastA, firstB, lastB,
    peakOfA: (from, to) => peakOnSplines(within(toneA, from, to)),
    peakOfB: () => peakOnSplines(toneB),
    reachedByA: (omega) => reached(a, omega),
    reachedByB: (omega) => reached(b, omega),
    frequencyOfB: (t) => frequency(b, Float64Array.of(t))[0]!,
    bestShift: (window, low, high) => bestShift(a, b, window, low, high),
    means: (window, shift) => {
      const { t, w } = windowNodes(toneA, window);
      const { phase, ratio } = anchored(a, b, shift, window[0], t);
      return { phase: mean(w, phase), ratio: mean(w, ratio) };
    },
    between: (shift, anchor, t) => {
      const { phase, ratio } = anchored(a, b, shift, anchor, Float64Array.of(t));
      return { phase: phase[0]!, ratio: ratio[0]! };
    },
    along: (shift, anchor, from, to) => {
      const t = pathBetween(toneA, from, to);
      return { t, ...anchored(a, b, shift, anchor, t) };
    },
  };
}
