import { derivativesAtSamples, quadratureWeights } from '../radiation/local-calculus';
import { interpolatePair } from '../series/local-interpolation';
import { polarOf } from '../series/polar';
import { fallingZero, peakOnSamples } from '../tones/peak';
import { within, type Tone } from '../tones/tone';
import { FLAT_RAD, type PairRoute } from './alignment';

/** How route A works: each entry is a knob of its own error bar. */
export interface PairNumerics {
  readonly interpolation: number;
  readonly stencil: number;
  readonly quadrature: 4 | 6 | 8;
  /** Grid points a sample of the window. */
  readonly density: number;
  readonly peak: 'polynomial' | 'parabola';
}

export const housePair: PairNumerics = { interpolation: 8, stencil: 13, quadrature: 8, density: 2, peak: 'polynomial' };
export const coarserPair: PairNumerics = { interpolation: 6, stencil: 9, quadrature: 6, density: 1, peak: 'parabola' };

/** Phase (increasing for house rotation), its slope and amplitude at the samples of a tone. */
interface Followed {
  readonly axis: Float64Array;
  readonly phase: Float64Array;
  readonly omega: Float64Array;
  readonly amplitude: Float64Array;
}

function follow(tone: Tone, stencil: number): Followed {
  const { amplitude, phase: argument } = polarOf(tone);
  const phase = argument.map((x) => -x);
  const { slopes } = derivativesAtSamples(tone.axis, [phase], stencil, tone.isEven);
  return { axis: tone.axis, phase, omega: slopes[0]!, amplitude };
}

const FEWEST = 64;
const MOST = 8000;
/** The cost is smooth in the shift: so many points find the right valley, all of them its floor. */
const MOST_IN_SEARCH = 1000;
/** Lags tried before the best is refined: a sixteenth of the window apart, within bounds. */
const LAGS = { aWindow: 16, fewest: 40, most: 600 } as const;

interface WindowGrid {
  readonly t0: number;
  readonly dt: number;
  readonly n: number;
  readonly weights: Float64Array;
}

function gridOf({ axis }: Followed, [from, to]: readonly [number, number], { quadrature, density }: PairNumerics, most = MOST): WindowGrid {
  const inside = axis.filter((t) => t > from && t < to).length;
  const n = Math.min(most, Math.max(FEWEST, density * (inside + 1))) + 1;
  const dt = (to - from) / (n - 1);
  const times = Float64Array.from({ length: n }, (_, i) => from + i * dt);
  return { t0: from, dt, n, weights: quadratureWeights(times, from, quadrature, true).map((w) => w / (to - from)) };
}

const weighted = (weights: Float64Array, valueAt: (i: number) => number): number => {
  let sum = 0;
  for (let i = 0; i < weights.length; i++) sum += weights[i]! * valueAt(i);
  return sum;
};

/** Variance of the phase difference over the window, half its slope in the shift, and that of the frequency. */
function costAt(a: Float64Array, b: Followed, grid: WindowGrid, shift: number, order: number): { readonly variance: number; readonly slope: number; readonly spread: number } {
  const [phase, omega] = interpolatePair({ axis: b.axis, first: b.phase, second: b.omega }, { t0: grid.t0 + shift, dt: grid.dt, n: grid.n }, order);
  const { weights } = grid;
  const mean = weighted(weights, (i) => phase[i]! - a[i]!);
  const rate = weighted(weights, (i) => omega[i]!);
  const left = (i: number): number => phase[i]! - a[i]! - mean;
  const bent = (i: number): number => omega[i]! - rate;
  return { variance: weighted(weights, (i) => left(i) ** 2), slope: weighted(weights, (i) => left(i) * bent(i)), spread: weighted(weights, (i) => bent(i) ** 2) };
}

function bestShift(a: Followed, b: Followed, numerics: PairNumerics, window: readonly [number, number], low: number, high: number): { shift: number; degenerate: boolean } {
  const costOn = (grid: WindowGrid) => {
    const [phaseA] = interpolatePair({ axis: a.axis, first: a.phase, second: a.phase }, grid, numerics.interpolation);
    return (shift: number) => costAt(phaseA, b, grid, Math.min(Math.max(shift, low), high), numerics.interpolation);
  };
  const rough = costOn(gridOf(a, window, numerics, MOST_IN_SEARCH));
  const cost = costOn(gridOf(a, window, numerics));
  const length = window[1] - window[0];
  const lags = Math.min(LAGS.most, Math.max(LAGS.fewest, Math.ceil(((high - low) / length) * LAGS.aWindow)));
  const step = (high - low) / lags;
  const zero = Math.min(Math.max(0, low), high);
  let [best, least] = [zero, rough(zero).variance];
  for (let i = 0; i <= lags; i++) {
    const here = rough(low + i * step).variance;
    if (here < least) [best, least] = [low + i * step, here];
  }
  if (Math.sqrt(cost(best).spread) * length < FLAT_RAD) return { shift: zero, degenerate: true };
  const shift = fallingZero((x) => -cost(x).slope, Math.max(low, best - step), Math.min(high, best + step));
  return { shift, degenerate: false };
}

/** First time at which the sampled frequency rises through ω. */
function reached({ axis, omega, phase }: Followed, wanted: number, order: number): number | null {
  const i = omega.findIndex((w) => w >= wanted);
  if (i <= 0) return null;
  const [from, to] = [Math.max(0, i - 16), Math.min(axis.length, i + 16)];
  const near = { axis: axis.subarray(from, to), first: omega.subarray(from, to), second: phase.subarray(from, to) };
  return fallingZero((t) => wanted - interpolatePair(near, { t0: t, dt: 1, n: 1 }, order)[0][0]!, axis[i - 1]!, axis[i]!);
}

/**
 * Route A of a pair.
 * Shape:  see PairRoute.
 * Units:  M and rad.
 * Error:  order 8 in the step, in phase and amplitude.
 * Fails:  never; see PairRoute for what is null.
 * Source: Q19; settings.md section 6.
 */
export function pairOnSamples(toneA: Tone, toneB: Tone, numerics: PairNumerics): PairRoute {
  const [a, b] = [follow(toneA, numerics.stencil), follow(toneB, numerics.stencil)];
  const order = numerics.interpolation;
  const onGrid = (of: Followed, grid: { t0: number; dt: number; n: number }) => interpolatePair({ axis: of.axis, first: of.phase, second: of.amplitude }, grid, order);
  const differences = (shift: number, grid: { t0: number; dt: number; n: number }) => {
    const [phaseA, sizeA] = onGrid(a, grid);
    const [phaseB, sizeB] = onGrid(b, { ...grid, t0: grid.t0 + shift });
    return { phase: phaseB.map((x, i) => x - phaseA[i]!), ratio: sizeB.map((x, i) => x / sizeA[i]!) };
  };
  return {
    firstA: a.axis[0]!, lastA: a.axis[a.axis.length - 1]!, firstB: b.axis[0]!, lastB: b.axis[b.axis.length - 1]!,
    peakOfA: (from, to) => peakOnSamples(within(toneA, from, to), numerics.peak),
    peakOfB: () => peakOnSamples(toneB, numerics.peak),
    reachedByA: (omega) => reached(a, omega, order),
    reachedByB: (omega) => reached(b, omega, order),
    frequencyOfB: (t) => interpolatePair({ axis: b.axis, first: b.omega, second: b.phase }, { t0: t, dt: 1, n: 1 }, order)[0][0]!,
    bestShift: (window, low, high) => bestShift(a, b, numerics, window, low, high),
    means: (window, shift) => {
      const grid = gridOf(a, window, numerics);
      const { phase, ratio } = differences(shift, grid);
      return { phase: weighted(grid.weights, (i) => phase[i]!), ratio: weighted(grid.weights, (i) => ratio[i]!) };
    },
    between: (shift, _anchor, t) => {
      const { phase, ratio } = differences(shift, { t0: t, dt: 1, n: 1 });
      return { phase: phase[0]!, ratio: ratio[0]! };
    },
    along: (shift, _anchor, from, to) => {
      const grid = gridOf(a, [from, to], { ...numerics, density: 4 });
      return { t: Float64Array.from({ length: grid.n }, (_, i) => grid.t0 + i * grid.dt), ...differences(shift, grid) };
    },
  };
}
