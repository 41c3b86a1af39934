import { quadratureWeights } from '../radiation/local-calculus';
import { interpolatePair } from '../series/local-interpolation';
import { polarOf } from '../series/polar';
import { fallingZero, peakOnSamples } from '../tones/peak';
import { within, type Tone } from '../tones/tone';
import { SHARE_OF_PEAK, type RunCurves, type ThreeTones } from './run-curves';

/** How route A works: each entry is a knob of its own error bar. */
export interface CurveNumerics {
  readonly interpolation: 6 | 8;
  readonly quadrature: 6 | 8;
  /** Grid points a sample. */
  readonly density: number;
  readonly peak: 'polynomial' | 'parabola';
}

export const houseCurves: CurveNumerics = { interpolation: 8, quadrature: 8, density: 2, peak: 'polynomial' };
export const coarserCurves: CurveNumerics = { interpolation: 6, quadrature: 6, density: 1, peak: 'parabola' };

const POINTS = { fewest: 64, most: 8000 } as const;

/**
 * Route A: where the finest run falls below a tenth of its peak, on its samples; the end given where it does not.
 * Shape:  one time.
 * Units:  M.
 * Error:  of the stated order in the step.
 * Fails:  never.
 * Source: settings.md section 6.
 */
export function endOnSamples(finest: Tone, from: number, to: number, { interpolation, peak }: CurveNumerics): number {
  const inside = within(finest, from, to);
  const at = peakOnSamples(inside, peak);
  if (at === null) return to;
  const { axis } = inside;
  const { amplitude } = polarOf(inside);
  const read = (t: number): number => interpolatePair({ axis, first: amplitude, second: amplitude }, { t0: t, dt: 1, n: 1 }, interpolation)[0][0]!;
  const floor = SHARE_OF_PEAK * read(at);
  const i = axis.findIndex((t, k) => t > at && amplitude[k]! < floor);
  return i <= 0 ? to : fallingZero((t) => read(t) - floor, axis[i - 1]!, axis[i]!);
}

const subtract = (p: Float64Array, q: Float64Array): Float64Array => p.map((x, i) => x - q[i]!);

/** Whole turns between two runs are chosen where the interval begins. */
function withoutTurns(difference: Float64Array): Float64Array {
  const turns = 2 * Math.PI * Math.ceil(difference[0]! / (2 * Math.PI) - 0.5);
  return difference.map((x) => x - turns);
}

/**
 * Route A: differences of three runs on an even grid, through amplitude and unwrapped phase.
 * Shape:  see RunCurves.
 * Units:  rad, and those of the amplitudes.
 * Error:  of the stated order in the step.
 * Fails:  never for an interval inside all three.
 * Source: Q20; settings.md section 6.
 */
export function curvesOnSamples(tones: ThreeTones, from: number, to: number, numerics: CurveNumerics): RunCurves {
  const inside = Math.max(...tones.map(({ axis }) => axis.filter((t) => t > from && t < to).length));
  const n = Math.min(POINTS.most, Math.max(POINTS.fewest, numerics.density * (inside + 1))) + 1;
  const grid = { t0: from, dt: (to - from) / (n - 1), n };
  const t = Float64Array.from({ length: n }, (_, i) => from + i * grid.dt);
  const w = quadratureWeights(t, from, numerics.quadrature, true).map((x) => x / (to - from));
  const [c, m, f] = tones.map((tone) => {
    const { amplitude, phase } = polarOf(tone);
    const [a, p] = interpolatePair({ axis: tone.axis, first: amplitude, second: phase }, grid, numerics.interpolation);
    return { amplitude: a, phase: p.map((x) => -x) };
  }) as [Polar, Polar, Polar];
  const phase = [withoutTurns(subtract(c.phase, m.phase)), withoutTurns(subtract(m.phase, f.phase))] as const;
  const amplitude = [subtract(c.amplitude, m.amplitude), subtract(m.amplitude, f.amplitude)] as const;
  return { t, w, phase, amplitude, complex: [chord(c, m, amplitude[0], phase[0]), chord(m, f, amplitude[1], phase[1])], finest: f.amplitude };
}

interface Polar {
  readonly amplitude: Float64Array;
  readonly phase: Float64Array;
}

/** |H₁ − H₂| from sides and angle; the half angle keeps small differences exact. */
const chord = (p: Polar, q: Polar, apart: Float64Array, angle: Float64Array): Float64Array =>
  apart.map((d, i) => Math.sqrt(d * d + 4 * p.amplitude[i]! * q.amplitude[i]! * Math.sin(angle[i]! / 2) ** 2));
