import type { Waveform } from '@/lib/engine/contract/waveform';
import { spinWeightedHarmonic } from '@/lib/engine/modes/spin-weighted-harmonic';
import { interpolatePair, type UniformGrid } from '@/lib/engine/series/local-interpolation';
import { interpolateThroughPolar, isFinelySampled, polarOf, type ComplexSeries } from '@/lib/engine/series/polar';
import { derivativeOrder, type Spectrum } from './spectrum';

interface FilePair {
  /** Z(f) and Y(f) = Z(−f)* on the file's own frequencies. */
  readonly z: ComplexSeries;
  readonly y: ComplexSeries;
}

const zeros = (n: number): ComplexSeries => ({ re: new Float64Array(n), im: new Float64Array(n) });

function ofLineOfSight(waveform: Waveform): FilePair {
  const { content, axis } = waveform;
  const n = axis.length;
  const [z, y] = [zeros(n), zeros(n)];
  if (content.kind !== 'line-of-sight') return { z, y };
  for (let k = 0; k < n; k++) {
    const [p, q] = [content.plus[k]!, content.plusIm?.[k] ?? 0];
    const [c, d] = [content.cross?.[k] ?? 0, content.crossIm?.[k] ?? 0];
    // Z = P − iC, Y = P + iC.
    [z.re[k], z.im[k], y.re[k], y.im[k]] = [p + d, q - c, p - d, q + c];
  }
  return { z, y };
}

function ofModes(waveform: Waveform, weigh: (l: number, m: number) => { re: number; im: number }): FilePair {
  const { content, axis } = waveform;
  const n = axis.length;
  const [z, y] = [zeros(n), zeros(n)];
  if (content.kind !== 'modes') return { z, y };
  for (const mode of content.modes) {
    const w = weigh(mode.l, mode.m);
    const target = mode.atNegativeFrequencies ? y : z;
    const sign = mode.atNegativeFrequencies ? -1 : 1;
    for (let k = 0; k < n; k++) {
      const [a, b] = [mode.re[k]!, mode.im[k]!];
      target.re[k]! += w.re * a - w.im * b;
      target.im[k]! += sign * (w.re * b + w.im * a);
    }
  }
  return { z, y };
}

/** Group delays −dφ/2πdf between neighbouring samples, where both are above 10⁻⁴ of the largest f|h̃|. */
function delaysOf(axis: Float64Array, pair: FilePair): { mean: number; span: number } {
  let [weightSum, delaySum, low, high] = [0, 0, Infinity, -Infinity];
  const size = (s: ComplexSeries, k: number): number => Math.hypot(s.re[k]!, s.im[k]!) * axis[k]!;
  let top = 0;
  for (let k = 0; k < axis.length; k++) top = Math.max(top, size(pair.z, k), size(pair.y, k));
  for (const s of [pair.z, pair.y]) {
    for (let k = 1; k < axis.length; k++) {
      if (Math.min(size(s, k - 1), size(s, k)) <= 1e-4 * top) continue;
      const [a, b, c, d] = [s.re[k - 1]!, s.im[k - 1]!, s.re[k]!, s.im[k]!];
      const delay = -Math.atan2(a * d - b * c, a * c + b * d) / (2 * Math.PI * (axis[k]! - axis[k - 1]!));
      const weight = size(s, k) ** 2 * (axis[k]! - axis[k - 1]!);
      [weightSum, delaySum, low, high] = [weightSum + weight, delaySum + weight * delay, Math.min(low, delay), Math.max(high, delay)];
    }
  }
  return weightSum > 0 ? { mean: delaySum / weightSum, span: high - low } : { mean: 0, span: 0 };
}

/** e^{+2πift₀}: the delay is taken out before interpolation and kept as the reference time. */
function advanced(axis: Float64Array, s: ComplexSeries, t0: number): ComplexSeries {
  const out = zeros(axis.length);
  for (let k = 0; k < axis.length; k++) {
    const [c, d] = [Math.cos(2 * Math.PI * axis[k]! * t0), Math.sin(2 * Math.PI * axis[k]! * t0)];
    out.re[k] = s.re[k]! * c - s.im[k]! * d;
    out.im[k] = s.re[k]! * d + s.im[k]! * c;
  }
  return out;
}

function interpolateFine(axis: Float64Array, s: ComplexSeries, grid: UniformGrid, order: number): ComplexSeries {
  const [re, im] = interpolatePair({ axis, first: s.re, second: s.im }, grid, order);
  return { re, im };
}

function onBins(
  axis: Float64Array,
  s: ComplexSeries,
  dF: number,
  first: number,
  last: number,
  order: number,
  power: number,
): ComplexSeries {
  const grid = { t0: first * dF, dt: dF, n: last - first + 1 };
  const { re, im } = isFinelySampled(s) ? interpolateFine(axis, s, grid, order) : interpolateThroughPolar(axis, s, polarOf(s), grid, order);
  const out = zeros(last + 1);
  for (let k = first; k <= last; k++) {
    const [x, y] = [re[k - first]!, im[k - first]!];
    const w = 2 * Math.PI * k * dF;
    out.re[k] = power === 0 ? x : power === 1 ? y / w : -x / (w * w);
    out.im[k] = power === 0 ? y : power === 1 ? -x / w : -y / (w * w);
  }
  return out;
}

export interface FrequencySource {
  readonly waveform: Waveform;
  /** Range of group delays: about the length in time of what the file holds; the bins are halved until sums settle. */
  readonly span: number;
  /** Bins up to fTop only (per unit): a file may reach far beyond the band. */
  readonly spectrum: (dF: number, order: number, fTop: number, weigh: (l: number, m: number) => { re: number; im: number }) => Spectrum;
}

/**
 * A waveform given as h̃(f), f > 0, on the bins of a sum.
 * Shape:  as `Spectrum`; bins outside the file's range are not valid and its content there is zero.
 * Units:  the waveform's own (rh̃/M² against MF, or 1/Hz).
 * Error:  local interpolation of the order asked for, after the mean delay is taken out.
 * Fails:  never; frequencies so far apart that the phase turns by more than half a cycle cannot be told apart from a slower turn.
 * Source: settings.md rule 2.1; a mode as given has content at +f alone, its mirror partner at −f.
 */
export function frequencySource(waveform: Waveform): FrequencySource {
  const { axis } = waveform;
  const weighAll = (l: number, m: number) => spinWeightedHarmonic(l, m, 0.9, 0.3);
  const pairOf = (weigh: (l: number, m: number) => { re: number; im: number }): FilePair =>
    waveform.content.kind === 'modes' ? ofModes(waveform, weigh) : ofLineOfSight(waveform);
  const delays = delaysOf(axis, pairOf(weighAll));
  const power = derivativeOrder(waveform.variable);
  const spectrum: FrequencySource['spectrum'] = (dF, order, fTop, weigh) => {
    const pair = pairOf(weigh);
    const first = Math.max(1, Math.ceil(axis[0]! / dF));
    const last = Math.max(first, Math.min(Math.floor(axis[axis.length - 1]! / dF), Math.ceil(fTop / dF) + order));
    const z = onBins(axis, advanced(axis, pair.z, delays.mean), dF, first, last, order, power);
    const y = onBins(axis, advanced(axis, pair.y, delays.mean), dF, first, last, order, power);
    const ends = { fFirst: axis[0]!, fLast: axis[axis.length - 1]!, endsEarly: false };
    return { dF, zRe: z.re, zIm: z.im, yRe: y.re, yIm: y.im, firstBin: first, lastBin: last, referenceTime: delays.mean, ...ends };
  };
  return { waveform, span: delays.span + 1 / (axis[axis.length - 1]! - axis[0]!), spectrum };
}
