import type { Mode } from '../contract/waveform';
import { powerOfTwoFrom, transformOfSize } from '../fourier/transform';
import { interpolatePair } from '../series/local-interpolation';
import { floorOfMode } from './integration-floor';
import { derivativesAtSamples } from './local-calculus';
import type { RadiationRecord } from './radiation-record';
import { largestTurns } from './sampling';

/** How route A works: each entry is a knob of its own error bar. */
export interface SampleNumerics {
  readonly stencil: number;
  readonly interpolation: number;
  /** Doublings of the number of points before ψ4 is transformed. */
  readonly refinements: number;
}

export const houseSamples: SampleNumerics = { stencil: 13, interpolation: 8, refinements: 1 };

/** Finer steps than this turn of the fastest phase add nothing before ψ4 is transformed. */
const RESOLVED_RAD = 0.1;

/** |Ḣ|² of each mode on one axis. */
export interface Fluxes {
  readonly axis: Float64Array;
  readonly isEven: boolean;
  readonly perMode: readonly { readonly l: number; readonly m: number; readonly power: Float64Array }[];
  /** Standard deviation of ℜḢ for samples with unit scatter; null when Ḣ was not differentiated. */
  readonly noiseGain: Float64Array | null;
}

function squared(re: Float64Array, im: Float64Array): Float64Array {
  const power = new Float64Array(re.length);
  for (let i = 0; i < power.length; i++) power[i] = re[i]! * re[i]! + im[i]! * im[i]!;
  return power;
}

/** One mode of ψ4 to news: divided by i·sign(ω)·max(|ω|, ω₀) after padding to twice the record's length. */
function newsFromPsi4(mode: Mode, axis: Float64Array, floor: number, points: number, order: number): Float64Array {
  const span = axis[axis.length - 1]! - axis[0]!;
  const grid = { t0: axis[0]!, dt: span / points, n: points + 1 };
  const [re, im] = interpolatePair({ axis, first: mode.re, second: mode.im }, grid, order);
  const transform = transformOfSize(2 * points);
  const data = new Float64Array(4 * points);
  const spectrum = new Float64Array(4 * points);
  for (let i = 0; i <= points; i++) {
    // The padded function jumps at both ends: half weights there keep the sums second order.
    const w = i === 0 || i === points ? 0.5 : 1;
    data[2 * i] = w * re[i]!;
    data[2 * i + 1] = w * im[i]!;
  }
  transform.forward(spectrum, data);
  for (let k = 0; k < 2 * points; k++) {
    const omega = (Math.PI / span) * (k <= points ? k : k - 2 * points);
    const divisor = (omega >= 0 ? 1 : -1) * Math.max(Math.abs(omega), floor);
    const [a, b] = [spectrum[2 * k]!, spectrum[2 * k + 1]!];
    spectrum[2 * k] = b / divisor;
    spectrum[2 * k + 1] = -a / divisor;
  }
  transform.inverse(data, spectrum);
  const power = new Float64Array(points + 1);
  for (let i = 0; i <= points; i++) power[i] = data[2 * i]! ** 2 + data[2 * i + 1]! ** 2;
  return power;
}

/**
 * Route A: |Ḣ|² of every mode. Strain is differentiated on its own samples, news is taken as it
 * stands, ψ4 is integrated in frequency with a floor on a uniform grid.
 * Shape:  one array a mode on the axis that comes back.
 * Units:  t in M; |Ḣ|² dimensionless; floor in rad/M for |m| = 2 (used for ψ4 alone).
 * Error:  see derivativesAtSamples; for ψ4 second order in the refined step at untapered ends only.
 * Fails:  never.
 * Source: settings.md rule 2.9; Reisswig & Pollney 2011, arXiv:1006.1632 (floor frequency).
 */
export function fluxOnSamples(record: RadiationRecord, floor: number, numerics: SampleNumerics): Fluxes {
  const { axis, modes, variable } = record;
  const isEven = record.step !== null;
  if (variable === 'news') return { axis, isEven, perMode: modes.map(({ l, m, re, im }) => ({ l, m, power: squared(re, im) })), noiseGain: null };
  if (variable === 'strain') {
    const { slopes, noiseGain } = derivativesAtSamples(axis, modes.flatMap(({ re, im }) => [re, im]), numerics.stencil, isEven);
    const perMode = modes.map(({ l, m }, k) => ({ l, m, power: squared(slopes[2 * k]!, slopes[2 * k + 1]!) }));
    return { axis, isEven, perMode, noiseGain };
  }
  const span = axis[axis.length - 1]! - axis[0]!;
  const resolved = powerOfTwoFrom((span * largestTurns(record).inTime) / RESOLVED_RAD);
  const points = Math.max(256, Math.min(powerOfTwoFrom(axis.length - 1), resolved)) * 2 ** numerics.refinements;
  const fine = Float64Array.from({ length: points + 1 }, (_, i) => axis[0]! + (i * span) / points);
  const perMode = modes.map((mode) => ({
    l: mode.l,
    m: mode.m,
    power: newsFromPsi4(mode, axis, floorOfMode(floor, mode.m), points, numerics.interpolation),
  }));
  return { axis: fine, isEven: true, perMode, noiseGain: null };
}
