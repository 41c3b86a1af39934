import type { Waveform } from '../../contract/waveform';
import { evaluateSplines, fitSpline, splineBasis } from './banded-spline';

/** One complex series on equal steps, in the waveform's own units: a mode, or plus − i·cross. */
export interface ComplexSeries {
  readonly l: number;
  readonly m: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export interface UniformRecord {
  readonly first: number;
  readonly step: number;
  readonly n: number;
  readonly parts: readonly ComplexSeries[];
  /** Of the file's own times: it sets the Nyquist frequency. */
  readonly medianStep: number;
}

/** Above this many points the resampled record would not fit beside its spectrum in a worker's memory. */
const MOST_SAMPLES = 1 << 22;

const records = new WeakMap<Waveform, UniformRecord>();

function partsOf(waveform: Waveform): ComplexSeries[] {
  const { content } = waveform;
  if (content.kind === 'modes') return content.modes.map(({ l, m, re, im }) => ({ l, m, re, im }));
  const im = content.cross === null ? new Float64Array(content.plus.length) : content.cross.map((x) => -x);
  return [{ l: 0, m: 0, re: content.plus, im }];
}

function smallestStep(axis: Float64Array): number {
  let least = Infinity;
  for (let i = 1; i < axis.length; i++) least = Math.min(least, axis[i]! - axis[i - 1]!);
  return least;
}

function medianStepOf(axis: Float64Array): number {
  const steps = Float64Array.from({ length: axis.length - 1 }, (_, i) => axis[i + 1]! - axis[i]!).sort();
  const middle = steps.length >> 1;
  return steps.length % 2 === 1 ? steps[middle]! : (steps[middle - 1]! + steps[middle]!) / 2;
}

function resample(waveform: Waveform): UniformRecord {
  const { axis } = waveform;
  const first = axis[0]!;
  const span = axis[axis.length - 1]! - first;
  const n = 1 + Math.min(Math.ceil(span / smallestStep(axis)), MOST_SAMPLES);
  const step = span / (n - 1);
  const points = Float64Array.from({ length: n }, (_, i) => Math.min(first + i * step, first + span));
  const basis = splineBasis(axis);
  const parts = partsOf(waveform).map((part) => {
    const [re, im] = evaluateSplines([fitSpline(basis, part.re), fitSpline(basis, part.im)], points);
    return { ...part, re: re!, im: im! };
  });
  return { first, step, n, parts, medianStep: medianStepOf(axis) };
}

/**
 * A time record on equal steps: its own samples when they are equally spaced, else a degree-7
 * spline through them read at the record's smallest step.
 * Shape:  every part has n samples; one part for a line of sight.
 * Units:  the waveform's own.
 * Error:  none for equal steps; else (ωΔt)⁸·8e-7 of the amplitude at the local step Δt.
 * Fails:  never.
 * Source: de Boor 1978 [from memory]; the choice of step is ours.
 */
export function uniformRecord(waveform: Waveform): UniformRecord {
  const known = records.get(waveform);
  if (known) return known;
  const { axis, uniformStep } = waveform;
  const record =
    uniformStep === null ? resample(waveform) : { first: axis[0]!, step: uniformStep, n: axis.length, parts: partsOf(waveform), medianStep: uniformStep };
  records.set(waveform, record);
  return record;
}

/** sin-like content of angle x a step survives an 8th difference as (2 sin x/2)⁸; this is x = 0.24. */
const RESOLVED = 1.25e-5;
const EIGHTH = [1, -8, 28, -56, 70, -56, 28, -8, 1];

function peakOf(re: Float64Array, im: Float64Array): number {
  let top = 0;
  for (let i = 0; i < re.length; i++) top = Math.max(top, Math.abs(re[i]!), Math.abs(im[i]!));
  return top;
}

function eighthDifferenceBelow(values: Float64Array, stride: number, bound: number): boolean {
  for (let i = 0; i + 8 * stride < values.length; i++) {
    let sum = 0;
    for (let k = 0; k <= 8; k++) sum += EIGHTH[k]! * values[i + k * stride]!;
    if (Math.abs(sum) > bound) return false;
  }
  return true;
}

/** A series' samples never change, and a sweep asks for the same one at every mass. */
const strides = new WeakMap<Pick<ComplexSeries, 're' | 'im'>, number>();

/**
 * The longest stride at which a degree-7 interpolant still resolves a series to about 1e-11.
 * Shape:  re, im parallel, and not changed afterwards; returns a power of two, at least 1.
 * Units:  samples.
 * Error:  content so small that its eighth difference hides below 1.25e-5 of the peak may be left out.
 * Fails:  never.
 * Source: our rule; checked by halving the stride in the tests.
 */
export function resolvedStride(series: Pick<ComplexSeries, 're' | 'im'>): number {
  const known = strides.get(series);
  if (known !== undefined) return known;
  const { re, im } = series;
  let stride = 1;
  const bound = RESOLVED * peakOf(re, im);
  const resolved = (s: number): boolean => 16 * s < re.length && eighthDifferenceBelow(re, s, bound) && eighthDifferenceBelow(im, s, bound);
  while (resolved(stride * 2)) stride *= 2;
  strides.set(series, stride);
  return stride;
}
