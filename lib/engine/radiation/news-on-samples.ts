import type { Mode } from '../contract/waveform';
import { powerOfTwoFrom, transformOfSize } from '../fourier/transform';
import { interpolatePair } from '../series/local-interpolation';
import { floorOfMode } from './integration-floor';
import { derivativesAtSamples } from './local-calculus';
import { divisionsTo, type RadiationRecord } from './radiation-record';
import { largestTurns } from './sampling';

/** How route A works: each entry is a knob of its own error bar. */
export interface SampleNumerics {
  readonly stencil: number;
  readonly interpolation: number;
  /** Doublings of the number of points before a series is transformed. */
  readonly refinements: number;
}

export const houseSamples: SampleNumerics = { stencil: 13, interpolation: 8, refinements: 1 };

/** The same route with every knob turned down: how far the number moves is its own error bar. */
export const coarserSamples: SampleNumerics = { stencil: 9, interpolation: 6, refinements: 0 };

/** Finer steps than this turn of the fastest phase add nothing before a series is transformed. */
const RESOLVED_RAD = 0.1;

/** Ḣ of each mode, and H where it is asked for, on one axis. */
export interface SampledRadiation {
  readonly axis: Float64Array;
  readonly isEven: boolean;
  readonly news: readonly Mode[];
  /** Parallel to `news`; null when only Ḣ was asked for. */
  readonly strain: readonly Mode[] | null;
  /** Standard deviation of ℜḢ for samples with unit scatter; null when Ḣ was not differentiated. */
  readonly noiseGain: Float64Array | null;
}

interface Divided {
  readonly once: Mode;
  readonly twice: Mode | null;
}

/** (re, im) over i·sign(ω)·max(|ω|, ω₀), in place. */
function divide(spectrum: Float64Array, span: number, floor: number): void {
  const count = spectrum.length / 2;
  for (let k = 0; k < count; k++) {
    const omega = (Math.PI / span) * (k <= count / 2 ? k : k - count);
    const divisor = (omega >= 0 ? 1 : -1) * Math.max(Math.abs(omega), floor);
    const [a, b] = [spectrum[2 * k]!, spectrum[2 * k + 1]!];
    spectrum[2 * k] = b / divisor;
    spectrum[2 * k + 1] = -a / divisor;
  }
}

function firstPoints(data: Float64Array, count: number, { l, m }: Mode): Mode {
  const [re, im] = [new Float64Array(count), new Float64Array(count)];
  for (let i = 0; i < count; i++) [re[i], im[i]] = [data[2 * i]!, data[2 * i + 1]!];
  return { l, m, re, im };
}

/** One mode on a uniform grid, divided once (or once and twice) by i·sign(ω)·max(|ω|, ω₀) after padding to twice the record's length. */
function dividedInFrequency(mode: Mode, span: number, floor: number, alsoTwice: boolean): Divided {
  const points = mode.re.length - 1;
  const transform = transformOfSize(2 * points);
  const data = new Float64Array(4 * points);
  const spectrum = new Float64Array(4 * points);
  for (let i = 0; i <= points; i++) {
    // The padded function jumps at both ends: half weights there keep the sums second order.
    const w = i === 0 || i === points ? 0.5 : 1;
    data[2 * i] = w * mode.re[i]!;
    data[2 * i + 1] = w * mode.im[i]!;
  }
  transform.forward(spectrum, data);
  divide(spectrum, span, floor);
  transform.inverse(data, spectrum);
  const once = firstPoints(data, points + 1, mode);
  if (!alsoTwice) return { once, twice: null };
  divide(spectrum, span, floor);
  transform.inverse(data, spectrum);
  return { once, twice: firstPoints(data, points + 1, mode) };
}

function onFineGrid(record: RadiationRecord, floor: number, numerics: SampleNumerics, withStrain: boolean): SampledRadiation {
  const { axis, modes, variable } = record;
  const span = axis[axis.length - 1]! - axis[0]!;
  const resolved = powerOfTwoFrom((span * largestTurns(record).inTime) / RESOLVED_RAD);
  const points = Math.max(256, Math.min(powerOfTwoFrom(axis.length - 1), resolved)) * 2 ** numerics.refinements;
  const grid = { t0: axis[0]!, dt: span / points, n: points + 1 };
  const news: Mode[] = [];
  const strain: Mode[] = [];
  for (const mode of modes) {
    const [re, im] = interpolatePair({ axis, first: mode.re, second: mode.im }, grid, numerics.interpolation);
    const fine = { l: mode.l, m: mode.m, re, im };
    const { once, twice } = dividedInFrequency(fine, span, floorOfMode(floor, mode.m), variable === 'psi4' && withStrain);
    news.push(variable === 'psi4' ? once : fine);
    if (withStrain) strain.push(twice ?? once);
  }
  return { axis: Float64Array.from({ length: points + 1 }, (_, i) => axis[0]! + (i * span) / points), isEven: true, news, strain: withStrain ? strain : null, noiseGain: null };
}

/**
 * Route A: Ḣ of every mode, and H where asked for. Strain is differentiated on its own samples, news
 * is taken as it stands; what has to be integrated is divided in frequency, with a floor, on a uniform grid.
 * Shape:  one complex series a mode on the axis that comes back.
 * Units:  t in M; Ḣ dimensionless, H in r·h/M; floor in rad/M for |m| = 2 (used where something is integrated).
 * Error:  see derivativesAtSamples; what is integrated is second order in the refined step at untapered ends only.
 * Fails:  never.
 * Source: settings.md rule 2.9; Reisswig & Pollney 2011, arXiv:1006.1632 (floor frequency).
 */
export function radiationOnSamples(record: RadiationRecord, floor: number, numerics: SampleNumerics, withStrain: boolean): SampledRadiation {
  const { axis, modes, variable } = record;
  if (divisionsTo(variable, withStrain) > 0) return onFineGrid(record, floor, numerics, withStrain);
  const isEven = record.step !== null;
  if (variable === 'news') return { axis, isEven, news: modes, strain: null, noiseGain: null };
  const { slopes, noiseGain } = derivativesAtSamples(axis, modes.flatMap(({ re, im }) => [re, im]), numerics.stencil, isEven);
  const news = modes.map(({ l, m }, k) => ({ l, m, re: slopes[2 * k]!, im: slopes[2 * k + 1]! }));
  return { axis, isEven, news, strain: withStrain ? modes : null, noiseGain };
}

/**
 * |Ḣ|² of one mode.
 * Shape:  one number a sample.
 * Units:  dimensionless.
 * Error:  rounding.
 * Fails:  never.
 * Source: definition.
 */
export function squared({ re, im }: Mode): Float64Array {
  const power = new Float64Array(re.length);
  for (let i = 0; i < power.length; i++) power[i] = re[i]! * re[i]! + im[i]! * im[i]!;
  return power;
}
