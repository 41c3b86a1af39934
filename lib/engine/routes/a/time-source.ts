import { nyquistFrequency } from '@/lib/engine/conditioning/nyquist-frequency';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { spinWeightedHarmonic } from '@/lib/engine/modes/spin-weighted-harmonic';
import { interpolatePair, type UniformGrid } from '@/lib/engine/series/local-interpolation';
import { interpolateThroughPolar, polarOf, type ComplexSeries, type PolarSeries } from '@/lib/engine/series/polar';
import { fastestOfReal, surveyRecord, type RecordSurvey } from './record-survey';

/** A uniform grid on a record: every stride-th sample as it stands, or interpolated (stride null). */
export interface SampleGrid extends UniformGrid {
  readonly tEnd: number;
  readonly stride: number | null;
}

export interface Samples {
  readonly re: Float64Array;
  /** Null when the strain is real. */
  readonly im: Float64Array | null;
}

export interface Polarisations {
  readonly plus: number;
  readonly cross: number;
}

/** What route A knows of one time-domain record, computed once. */
export interface TimeSource {
  readonly waveform: Waveform;
  readonly axis: Float64Array;
  readonly span: number;
  /** 1/(2 × step), the median step where steps differ, in cycles per unit. */
  readonly nyquist: number;
  /** Largest |dh/dt| over 2π times the peak: about the frequency where the signal is strongest. */
  readonly fastest: number;
  /** plus·h₊ + cross·h× alone, of a bank that needs no other response. */
  readonly response: (grid: SampleGrid, order: number, inclinationRad: number, azimuthRad: number, of: Polarisations) => Float64Array;
  readonly lineOfSight: (grid: SampleGrid, order: number, inclinationRad: number, azimuthRad: number) => Samples;
  readonly mode: (grid: SampleGrid, order: number, index: number) => Samples;
}

/** The axis of an evenly sampled record is taken from its ends: printed times are rounded (rule 2.1). */
function exactAxis(waveform: Waveform): Float64Array {
  const { axis, uniformStep } = waveform;
  if (uniformStep === null) return axis;
  const exact = new Float64Array(axis.length);
  const from = axis[0]!;
  for (let k = 0; k < exact.length; k++) exact[k] = from + k * uniformStep;
  return exact;
}

interface Part extends ComplexSeries {
  readonly l: number;
  readonly m: number;
}

/** Columns along a line of sight are one "mode" without a harmonic. */
function partsOf(waveform: Waveform): { parts: Part[]; real: boolean; angular: boolean } {
  const { content } = waveform;
  if (content.kind === 'modes') return { parts: content.modes.map(({ l, m, re, im }) => ({ l, m, re, im })), real: false, angular: true };
  const { plus, cross } = content;
  const real = cross === null || cross.every((x) => x === 0);
  const im = real ? plus : cross.map((x) => -x);
  return { parts: [{ l: 0, m: 0, re: plus, im }], real, angular: false };
}

function every(series: Float64Array, stride: number, n: number): Float64Array {
  if (stride === 1 && n === series.length) return series;
  const out = new Float64Array(n);
  for (let k = 0; k < n; k++) out[k] = series[k * stride]!;
  return out;
}

function addTimes({ re, im }: ComplexSeries, part: ComplexSeries, { re: c, im: s }: { re: number; im: number }): void {
  const { re: x, im: y } = part;
  for (let k = 0; k < re.length; k++) {
    const a = x[k]!;
    const b = y[k]!;
    re[k]! += c * a - s * b;
    im[k]! += c * b + s * a;
  }
}

/** Adds c·re + s·im. */
function addReal(sum: Float64Array, { re, im }: ComplexSeries, c: number, s: number): void {
  if (s === 0) for (let k = 0; k < sum.length; k++) sum[k]! += c * re[k]!;
  else for (let k = 0; k < sum.length; k++) sum[k]! += c * re[k]! + s * im[k]!;
}

/** Partners by the mirror rule turn alike: one survey tells of both. */
function isPartner(p: Part, q: Part): boolean {
  if (p.l !== q.l || p.m !== -q.m) return false;
  const sign = p.l % 2 === 0 ? 1 : -1;
  for (let k = p.re.length - 1; k >= 0; k--) if (p.re[k]! !== sign * q.re[k]! || p.im[k]! !== -sign * q.im[k]!) return false;
  return true;
}

function surveysOf(axis: Float64Array, parts: readonly Part[]): RecordSurvey[] {
  const found: RecordSurvey[] = [];
  parts.forEach((part, i) => {
    const partner = parts.findIndex((other, j) => j < i && isPartner(other, part));
    found.push(found[partner] ?? surveyRecord(axis, part));
  });
  return found;
}

/**
 * Prepares a record for resampling.
 * Shape:  a time-domain waveform with the modes in use.
 * Units:  the waveform's own.
 * Error:  interpolation of the order asked for; none for samples used as they stand.
 * Fails:  never.
 * Source: engine design: amplitude and phase below 20 samples a cycle, re and im above.
 */
export function timeSource(waveform: Waveform): TimeSource {
  const axis = exactAxis(waveform);
  const { parts, real, angular } = partsOf(waveform);
  // Surveyed when first asked for, just before the samples are used: a bank's records do not all fit the processor's cache.
  let surveyed: RecordSurvey[] | null = null;
  const surveys = (): RecordSurvey[] => (surveyed ??= surveysOf(axis, parts));
  let fastest: number | null = null;
  const rateOf = (): number => Math.max(0, ...(real ? parts.map((part) => fastestOfReal(axis, part.re)) : surveys().map((survey) => survey.fastest)));
  const polar = new Map<number, PolarSeries | null>();
  const polarForm = (index: number): PolarSeries | null => {
    const kept = polar.get(index);
    if (kept !== undefined) return kept;
    const made = surveys()[index]!.isFine() ? null : polarOf(parts[index]!);
    polar.set(index, made);
    return made;
  };
  const partOn = (grid: SampleGrid, order: number, index: number): ComplexSeries => {
    const part = parts[index]!;
    if (grid.stride !== null) return { re: every(part.re, grid.stride, grid.n), im: every(part.im, grid.stride, grid.n) };
    const form = real ? null : polarForm(index);
    if (form !== null) return interpolateThroughPolar(axis, part, form, grid, order);
    const [re, im] = interpolatePair({ axis, first: part.re, second: part.im }, grid, order);
    return { re, im };
  };
  const lineOfSight = (grid: SampleGrid, order: number, inclinationRad: number, azimuthRad: number): Samples => {
    if (!angular) {
      const { re, im } = partOn(grid, order, 0);
      return { re, im: real ? null : im };
    }
    const sum = { re: new Float64Array(grid.n), im: new Float64Array(grid.n) };
    parts.forEach((part, index) => {
      const y = spinWeightedHarmonic(part.l, part.m, inclinationRad, azimuthRad);
      if (y.re !== 0 || y.im !== 0) addTimes(sum, partOn(grid, order, index), y);
    });
    return sum;
  };
  const response: TimeSource['response'] = (grid, order, inclinationRad, azimuthRad, { plus, cross }) => {
    const sum = new Float64Array(grid.n);
    parts.forEach((part, index) => {
      const y = angular ? spinWeightedHarmonic(part.l, part.m, inclinationRad, azimuthRad) : { re: 1, im: 0 };
      // z = h₊ − ih×, so that plus·h₊ + cross·h× is the real part of (plus + i·cross) z.
      const [c, s] = [plus * y.re - cross * y.im, real ? 0 : -(plus * y.im + cross * y.re)];
      if (c !== 0 || s !== 0) addReal(sum, partOn(grid, order, index), c, s);
    });
    return sum;
  };
  return {
    waveform,
    axis,
    span: axis[axis.length - 1]! - axis[0]!,
    nyquist: nyquistFrequency(waveform),
    get fastest() {
      return (fastest ??= rateOf());
    },
    response,
    lineOfSight,
    mode: partOn,
  };
}
