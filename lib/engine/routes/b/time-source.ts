import type { Side, TaperWindow } from '../../contract/route';
import { taperWeightAt } from '../../conditioning/taper-window';
import { spinWeightedHarmonic } from '../../modes/spin-weighted-harmonic';
import { pairTransform, type UniformPair } from './block-fourier';
import { edgeCorrection, taylorThrough, type Edge } from './edge-correction';
import { liveHigh } from './live-band';
import { derivativeOrder, integrateAndScale, type ModeSpectrum, type RouteBKnobs, type Source, type Spectrum } from './spectrum';
import { resolvedStride, uniformRecord, type UniformRecord } from './uniform-series';

/** The sampled series of one line of sight or one mode. */
interface Series {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

interface Sighted {
  readonly inclinationRad: number;
  readonly azimuthRad: number;
  readonly series: Series;
}

/** The last line of sight of each record: a sweep over masses looks along one. */
const sighted = new WeakMap<UniformRecord, Sighted>();

function lineOfSight(record: UniformRecord, isModes: boolean, inclinationRad: number, azimuthRad: number): Series {
  if (!isModes) return record.parts[0]!;
  const known = sighted.get(record);
  if (known?.inclinationRad === inclinationRad && known.azimuthRad === azimuthRad) return known.series;
  const series = sumOfModes(record, inclinationRad, azimuthRad);
  sighted.set(record, { inclinationRad, azimuthRad, series });
  return series;
}

function sumOfModes(record: UniformRecord, inclinationRad: number, azimuthRad: number): Series {
  const re = new Float64Array(record.n);
  const im = new Float64Array(record.n);
  for (const part of record.parts) {
    const y = spinWeightedHarmonic(part.l, part.m, inclinationRad, azimuthRad);
    for (let i = 0; i < record.n; i++) {
      re[i] = re[i]! + y.re * part.re[i]! - y.im * part.im[i]!;
      im[i] = im[i]! + y.re * part.im[i]! + y.im * part.re[i]!;
    }
  }
  return { re, im };
}

/** Longest stride whose grid still carries frequencies up to `high` at four points a cycle. */
function strideFor(series: Series, step: number, high: number, thinning: number): number {
  let stride = resolvedStride(series) * thinning;
  if (stride === thinning) stride = 1;
  while (stride > 1 && stride * step * high > 0.25) stride /= 2;
  return stride;
}

/** Tapered samples at every `stride`-th point, about the middle of what they span. */
function thinned(series: Series, record: UniformRecord, taper: TaperWindow, stride: number): UniformPair {
  const n = Math.floor((record.n - 1) / stride) + 1;
  const x = new Float64Array(n);
  const y = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    const w = taperWeightAt(taper, record.first + i * stride * record.step);
    x[i] = w * series.re[i * stride]!;
    y[i] = w * series.im[i * stride]!;
  }
  return { step: stride * record.step, x, y };
}

/** The ramps as analytic functions, which continue beyond the ends that `taperWeightAt` gives them. */
const rampUp = (t: number, ramp: { from: number; to: number }): number => Math.sin(((Math.PI / 2) * (t - ramp.from)) / (ramp.to - ramp.from)) ** 2;
const rampDown = (t: number, ramp: { from: number; to: number }): number => Math.sin(((Math.PI / 2) * (ramp.to - t)) / (ramp.to - ramp.from)) ** 2;

interface EdgeSpec {
  readonly time: number;
  readonly inward: 1 | -1;
  readonly factor: (t: number) => number;
}

/** Ends of the record, and the times where a ramp meets 1: there f = h − h·(1 − ramp) on the ramp's side. */
function edgeSpecs(record: UniformRecord, taper: TaperWindow): EdgeSpec[] {
  const last = record.first + (record.n - 1) * record.step;
  const { start, end } = taper;
  const specs: EdgeSpec[] = [
    { time: record.first, inward: 1, factor: start === null ? () => 1 : (t) => rampUp(t, start) },
    { time: last, inward: -1, factor: end === null ? () => 1 : (t) => rampDown(t, end) },
  ];
  if (start !== null && start.to < last) specs.push({ time: start.to, inward: -1, factor: (t) => rampUp(t, start) - 1 });
  if (end !== null && end.from > record.first) specs.push({ time: end.from, inward: 1, factor: (t) => rampDown(t, end) - 1 });
  return specs;
}

function edgeOf(spec: EdgeSpec, series: Series, record: UniformRecord, stride: number, fine: number): Edge | null {
  const samples = 8;
  if (record.n < samples * fine) return null;
  const position = (spec.time - record.first) / record.step;
  const start = Math.round(position - ((samples - 1) * fine) / 2);
  const from = Math.min(Math.max(start, 0), record.n - 1 - (samples - 1) * fine);
  const u = new Float64Array(samples);
  const x = new Float64Array(samples);
  const y = new Float64Array(samples);
  for (let j = 0; j < samples; j++) {
    const i = from + j * fine;
    const factor = spec.factor(record.first + i * record.step);
    u[j] = (spec.inward * (i - position)) / stride;
    x[j] = factor * series.re[i]!;
    y[j] = factor * series.im[i]!;
  }
  const middle = Math.floor((record.n - 1) / stride) / 2;
  const onGrid = position / stride;
  const nearest = spec.inward === 1 ? Math.ceil(onGrid - 1e-9) : Math.floor(onGrid + 1e-9);
  const offset = Math.max(0, spec.inward * (nearest - onGrid));
  return { at: onGrid - middle, inward: spec.inward, offset, x: taylorThrough(u, x), y: taylorThrough(u, y) };
}

function addEdges(spectrum: Spectrum, edges: readonly Edge[], f: Float64Array, step: number): void {
  const out = new Float64Array(4);
  for (const correction of edges.map(edgeCorrection)) {
    for (let i = 0; i < f.length; i++) {
      correction(2 * Math.PI * f[i]! * step, out);
      spectrum.xRe[i] = spectrum.xRe[i]! + step * out[0]!;
      spectrum.xIm[i] = spectrum.xIm[i]! + step * out[1]!;
      spectrum.yRe[i] = spectrum.yRe[i]! + step * out[2]!;
      spectrum.yIm[i] = spectrum.yIm[i]! + step * out[3]!;
    }
  }
}

/** Moves the origin of time from the middle of the thinned grid to the middle of the record. */
function recentre(spectrum: Spectrum, f: Float64Array, by: number): void {
  if (by === 0) return;
  for (let i = 0; i < f.length; i++) {
    const c = Math.cos(2 * Math.PI * f[i]! * by);
    const s = Math.sin(2 * Math.PI * f[i]! * by);
    for (const [re, im] of [[spectrum.xRe, spectrum.xIm], [spectrum.yRe, spectrum.yIm]] as const) {
      [re[i], im[i]] = [re[i]! * c - im[i]! * s, re[i]! * s + im[i]! * c];
    }
  }
}

/** Transform of one tapered series in the waveform's own units about the middle of the record. */
function seriesTransform(series: Series, record: UniformRecord, taper: TaperWindow, f: Float64Array, knobs: RouteBKnobs): Spectrum {
  const high = f.length === 0 ? 0 : f[f.length - 1]!;
  const stride = strideFor(series, record.step, high, knobs.thinning);
  const pair = thinned(series, record, taper, stride);
  const spectrum = pairTransform(pair, f);
  const fine = Math.max(1, Math.round(stride / knobs.thinning));
  const edges = edgeSpecs(record, taper).map((spec) => edgeOf(spec, series, record, stride, fine));
  addEdges(spectrum, edges.filter((edge) => edge !== null), f, pair.step);
  recentre(spectrum, f, ((record.n - 1) * record.step - (pair.x.length - 1) * pair.step) / 2);
  return spectrum;
}

/** Nodes at which the record speaks; above its Nyquist frequency its content counts as zero. */
function below(f: Float64Array, limit: number): Float64Array {
  const count = f.findIndex((x) => x > limit);
  return count < 0 ? f : f.subarray(0, count);
}

function padded(spectrum: Spectrum, n: number): Spectrum {
  if (spectrum.xRe.length === n) return spectrum;
  const grow = (values: Float64Array): Float64Array => {
    const out = new Float64Array(n);
    out.set(values);
    return out;
  };
  return { xRe: grow(spectrum.xRe), xIm: grow(spectrum.xIm), yRe: grow(spectrum.yRe), yIm: grow(spectrum.yIm) };
}

/**
 * A time-domain side as a source: direct sums over its own (or spline-resampled) samples, thinned
 * to what its content needs, with closed-form corrections at ends and ramp joints.
 * Shape:  see Source.
 * Units:  spectra in strain per Hz.
 * Error:  sums 1e-14; edges as the degree-7 polynomial there; non-uniform records as uniformRecord.
 * Fails:  never.
 * Source: settings.md rules 2.1–2.6; our derivation.
 */
export function timeSource(side: Side, knobs: RouteBKnobs): Source {
  const { waveform, secondsPerUnit, strainPerUnit, taper } = side;
  const record = uniformRecord(waveform);
  const span = (record.n - 1) * record.step;
  const order = derivativeOrder(side);
  const isModes = waveform.content.kind === 'modes';
  const nyquistHz = 0.5 / record.medianStep / secondsPerUnit;
  const transform = (series: Series, fHz: Float64Array): Spectrum => {
    const f = below(fHz, nyquistHz).map((x) => x * secondsPerUnit);
    const spectrum = seriesTransform(series, record, taper, f, knobs);
    integrateAndScale(spectrum, f, order, strainPerUnit * secondsPerUnit);
    return padded(spectrum, fHz.length);
  };
  return {
    givenInFrequency: false,
    centreS: (record.first + span / 2) * secondsPerUnit,
    spanS: span * secondsPerUnit,
    nyquistHz,
    liveHighHz: (psd, lowHz, highHz, allModes) => {
      const high = Math.min(highHz, nyquistHz) * secondsPerUnit;
      const parts = allModes ? record.parts : [lineOfSight(record, isModes, side.inclinationRad, side.azimuthRad)];
      // One grid for all: octaves are counted in its step.
      const stride = Math.min(...parts.map((series) => strideFor(series, record.step, high, 1)));
      const pairs = parts.map((series) => thinned(series, record, taper, stride));
      return liveHigh(pairs, (f) => psd(f / secondsPerUnit), order, lowHz * secondsPerUnit, high) / secondsPerUnit;
    },
    line: (inclinationRad, azimuthRad, fHz) => transform(lineOfSight(record, isModes, inclinationRad, azimuthRad), fHz),
    modes: (fHz): ModeSpectrum[] => record.parts.map((part) => ({ l: part.l, m: part.m, spectrum: transform(part, fHz) })),
  };
}
