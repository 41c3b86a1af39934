import { derivativeOf, evaluateSplines, fitSpline, splineBasis } from '../routes/b/banded-spline';
import { gaussRule } from '../routes/b/gauss-legendre';
import { interpolatePair } from '../series/local-interpolation';
import { polarOf } from '../series/polar';
import { peakOnSamples, peakOnSplines, type PeakBy } from '../tones/peak';
import { within, type Tone } from '../tones/tone';

/** Amplitude of a tone at the peak of the waveform, and the phase it gathers from a start to there. */
export interface AtPeak {
  readonly amplitude: number;
  /** In rad; increasing for house rotation. */
  readonly phase: number;
  readonly timeM: number;
}

/** The tone that is read, the one whose peak counts, and between which times. */
export interface PeakReading {
  readonly tone: Tone;
  readonly peakTone: Tone;
  readonly startM: number;
  /** Read where there is no peak inside. */
  readonly endM: number;
}

const first = (axis: Float64Array): number => axis[0]!;

/**
 * Route A: on the samples, through amplitude and unwrapped phase by local polynomials.
 * Shape:  one reading.
 * Units:  M and rad.
 * Error:  of the stated order in the step.
 * Fails:  not finite where the start lies after the peak or outside the record.
 * Source: settings.md section 6 and rule 2.10.
 */
export function atPeakOnSamples({ tone, peakTone, startM, endM }: PeakReading, order: 6 | 8 = 8, peak: PeakBy = 'polynomial'): AtPeak {
  const timeM = peakOnSamples(within(peakTone, first(peakTone.axis), endM), peak) ?? endM;
  const { amplitude, phase } = polarOf(tone);
  const read = (t: number): readonly [number, number] => {
    const [a, p] = interpolatePair({ axis: tone.axis, first: amplitude, second: phase }, { t0: t, dt: 1, n: 1 }, order);
    return [a[0]!, -p[0]!];
  };
  const [height, there] = read(timeM);
  return { amplitude: height, phase: startM >= first(tone.axis) && startM < timeM ? there - read(startM)[1] : Number.NaN, timeM };
}

const NODES = 8;
const SAMPLES_A_PANEL = 3;

/** ∫φ̇ dt with φ̇ = −Im(Ḣ/H), by Gauss panels: no phase is unwrapped. */
function gathered(tone: Tone, from: number, to: number): number {
  if (!(from >= first(tone.axis) && from < to)) return Number.NaN;
  const basis = splineBasis(tone.axis);
  const values = [fitSpline(basis, tone.re), fitSpline(basis, tone.im)];
  const rule = gaussRule(NODES);
  const panels = Math.ceil(tone.axis.filter((t) => t > from && t < to).length / SAMPLES_A_PANEL) + 1;
  const half = (to - from) / panels / 2;
  const t = Float64Array.from({ length: panels * NODES }, (_, i) => from + half * (2 * Math.floor(i / NODES) + 1 + rule.x[i % NODES]!));
  const [re, im] = evaluateSplines(values, t) as [Float64Array, Float64Array];
  const [dre, dim] = evaluateSplines(values.map(derivativeOf), t) as [Float64Array, Float64Array];
  let phase = 0;
  for (let i = 0; i < t.length; i++) phase += (half * rule.w[i % NODES]! * (im[i]! * dre[i]! - re[i]! * dim[i]!)) / (re[i]! ** 2 + im[i]! ** 2);
  return phase;
}

/**
 * Route B: on splines of the real and imaginary part, the phase as the integral of its slope.
 * Shape:  one reading.
 * Units:  M and rad.
 * Error:  order 7 in the step.
 * Fails:  not finite where the start lies after the peak or outside the record.
 * Source: settings.md section 6 and rule 2.10.
 */
export function atPeakOnSplines({ tone, peakTone, startM, endM }: PeakReading): AtPeak {
  const timeM = peakOnSplines(within(peakTone, first(peakTone.axis), endM)) ?? endM;
  const basis = splineBasis(tone.axis);
  const [re, im] = evaluateSplines([fitSpline(basis, tone.re), fitSpline(basis, tone.im)], Float64Array.of(timeM));
  return { amplitude: Math.hypot(re![0]!, im![0]!), phase: gathered(tone, startM, timeM), timeM };
}

/** Samples to either side from which the bend of the amplitude is read. */
const REACH = 3;
/** Noise of the slope from a central stencil, in noise of a sample over the step. */
const SLOPE_NOISE = 1.2;

/**
 * How far printed digits move the time of the peak, as turned phase: noise of the slope of ln|H| over its bend, times the frequency.
 * Shape:  one standard deviation; zero where the peak is not inside.
 * Units:  rad for a relative slip of the samples.
 * Error:  an estimate on the large side.
 * Fails:  never; infinite on a flat top.
 * Source: propagation of independent inputs (JCGM 100:2008).
 */
export function turnOfPeak(tone: Tone, peakTone: Tone, timeM: number, slip: number): number {
  const { axis, re, im } = peakTone;
  const i = axis.findIndex((t) => t >= timeM);
  if (slip === 0 || i < REACH + 1 || i + REACH >= axis.length) return 0;
  const size = (k: number): number => Math.log(Math.hypot(re[k]!, im[k]!));
  const step = (axis[i + REACH]! - axis[i - REACH]!) / (2 * REACH);
  const bend = Math.abs(size(i + REACH) - 2 * size(i) + size(i - REACH)) / (REACH * step) ** 2;
  const k = Math.min(tone.axis.length - 1, Math.max(1, tone.axis.findIndex((t) => t >= timeM)));
  const turn = Math.atan2(tone.im[k]! * tone.re[k - 1]! - tone.re[k]! * tone.im[k - 1]!, tone.re[k]! * tone.re[k - 1]! + tone.im[k]! * tone.im[k - 1]!);
  return (Math.abs(turn / (tone.axis[k]! - tone.axis[k - 1]!)) * SLOPE_NOISE * slip) / step / bend;
}
