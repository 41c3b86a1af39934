import type { Side } from '../../contract/route';
import type { Waveform } from '../../contract/waveform';
import { spinWeightedHarmonic } from '../../modes/spin-weighted-harmonic';
import { evaluateSplines, fitSpline, splineBasis, type SplineBasis } from './banded-spline';
import { addRotated, derivativeOrder, emptySpectrum, integrateAndScale, type ModeSpectrum, type Source, type Spectrum } from './spectrum';

/** Samples of one transform on the file's own frequencies, and whether they stand for −f. */
interface Part {
  readonly l: number;
  readonly m: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly atNegative: boolean;
}

function unwrapped(re: Float64Array, im: Float64Array): Float64Array {
  const phase = new Float64Array(re.length);
  phase[0] = Math.atan2(im[0]!, re[0]!);
  for (let i = 1; i < re.length; i++) {
    phase[i] = phase[i - 1]! + Math.atan2(im[i]! * re[i - 1]! - re[i]! * im[i - 1]!, re[i]! * re[i - 1]! + im[i]! * im[i - 1]!);
  }
  return phase;
}

/** Amplitude and phase are smoother than the parts, unless the amplitude nearly vanishes somewhere. */
function hasSteadyAmplitude(amplitude: Float64Array): boolean {
  const top = amplitude.reduce((a, b) => Math.max(a, b), 0);
  return amplitude.every((a, i) => a > 1e-6 * top && (i === 0 || (a < 3 * amplitude[i - 1]! && 3 * a > amplitude[i - 1]!)));
}

/** Values of one part at ascending frequencies inside the file's range. */
function reader(part: Part, basis: SplineBasis): (f: Float64Array) => readonly [Float64Array, Float64Array] {
  const amplitude = part.re.map((x, i) => Math.hypot(x, part.im[i]!));
  if (!hasSteadyAmplitude(amplitude)) {
    const splines = [fitSpline(basis, part.re), fitSpline(basis, part.im)];
    return (f) => {
      const [re, im] = evaluateSplines(splines, f);
      return [re!, im!];
    };
  }
  const splines = [fitSpline(basis, amplitude), fitSpline(basis, unwrapped(part.re, part.im))];
  return (f) => {
    const [size, phase] = evaluateSplines(splines, f);
    return [size!.map((a, i) => a * Math.cos(phase![i]!)), size!.map((a, i) => a * Math.sin(phase![i]!))];
  };
}

/** Group delays −dφ/dω between neighbours, in units of 1/frequency, where there is signal. */
function delays(part: Part, axis: Float64Array): number[] {
  const phase = unwrapped(part.re, part.im);
  const size = part.re.map((x, i) => Math.hypot(x, part.im[i]!));
  const top = size.reduce((a, b) => Math.max(a, b), 0);
  const found: number[] = [];
  for (let i = 1; i < axis.length; i++) {
    if (size[i]! > 1e-6 * top) found.push((part.atNegative ? 1 : -1) * (phase[i]! - phase[i - 1]!) / (2 * Math.PI * (axis[i]! - axis[i - 1]!)));
  }
  return found;
}

function partsOf(waveform: Waveform): Part[] {
  const { content } = waveform;
  if (content.kind === 'modes') {
    return content.modes.map((mode) => ({ ...mode, atNegative: mode.atNegativeFrequencies === true }));
  }
  const zeros = new Float64Array(waveform.axis.length);
  const plus = { l: 0, m: 0, re: content.plus, im: content.plusIm ?? zeros, atNegative: false };
  const cross = { l: 0, m: 0, re: content.cross ?? zeros, im: content.crossIm ?? zeros, atNegative: false };
  return [plus, cross];
}

/** Transforms of the real parts of a complex series from its content at +f or at −f alone. */
function oneSided(re: Float64Array, im: Float64Array, first: number, n: number, atNegative: boolean): Spectrum {
  const spectrum = emptySpectrum(n);
  const sign = atNegative ? -1 : 1;
  for (let i = 0; i < re.length; i++) {
    // z(f) alone: x = z/2, y = z/(2i); z(−f) alone: x = z*/2, y = −z*/(2i).
    spectrum.xRe[first + i] = re[i]! / 2;
    spectrum.xIm[first + i] = (sign * im[i]!) / 2;
    spectrum.yRe[first + i] = im[i]! / 2;
    spectrum.yIm[first + i] = (-sign * re[i]!) / 2;
  }
  return spectrum;
}

function turn(spectrum: Spectrum, fHz: Float64Array, centreS: number): void {
  for (let i = 0; i < fHz.length; i++) {
    const c = Math.cos(2 * Math.PI * fHz[i]! * centreS);
    const s = Math.sin(2 * Math.PI * fHz[i]! * centreS);
    for (const [re, im] of [[spectrum.xRe, spectrum.xIm], [spectrum.yRe, spectrum.yIm]] as const) {
      [re[i], im[i]] = [re[i]! * c - im[i]! * s, re[i]! * s + im[i]! * c];
    }
  }
}

/**
 * A frequency-domain side as a source: degree-7 splines of amplitude and phase on the file's own frequencies.
 * Shape:  see Source; zero outside the file's range.
 * Units:  spectra in strain per Hz.
 * Error:  that of the spline; none from transforms.
 * Fails:  never.
 * Source: settings.md rule 2.1; our derivation.
 */
export function frequencySource(side: Side): Source {
  const { waveform, secondsPerUnit, strainPerUnit } = side;
  const { axis } = waveform;
  const basis = splineBasis(axis);
  const parts = partsOf(waveform);
  const readers = parts.map((part) => reader(part, basis));
  const all = parts.flatMap((part) => delays(part, axis));
  const [earliest, latest] = all.reduce(([a, b], x) => [Math.min(a, x), Math.max(b, x)], [Infinity, -Infinity]);
  const centreS = all.length === 0 ? 0 : ((earliest + latest) / 2) * secondsPerUnit;
  const order = derivativeOrder(side);
  // The axis of a file in M is MF; a strain in M is H, its transform H·M: one more factor of seconds.
  const scale = strainPerUnit * secondsPerUnit;
  const spectrumOf = (k: number, fHz: Float64Array): Spectrum => {
    const own = fHz.map((x) => x * secondsPerUnit);
    const first = own.findIndex((x) => x >= axis[0]!);
    const end = own.findLastIndex((x) => x <= axis[axis.length - 1]!) + 1;
    if (first < 0 || end <= first) return emptySpectrum(fHz.length);
    const [re, im] = readers[k]!(own.subarray(first, end));
    const spectrum = oneSided(re, im, first, fHz.length, parts[k]!.atNegative);
    integrateAndScale(spectrum, own, order, scale);
    turn(spectrum, fHz, centreS);
    return spectrum;
  };
  return {
    givenInFrequency: true,
    centreS,
    spanS: all.length === 0 ? 0 : (latest - earliest) * secondsPerUnit,
    nyquistHz: axis[axis.length - 1]! / secondsPerUnit,
    liveHighHz: (_psd, _lowHz, highHz) => Math.min(highHz, axis[axis.length - 1]! / secondsPerUnit),
    line: (inclinationRad, azimuthRad, fHz) => {
      if (waveform.content.kind !== 'modes') return columns(spectrumOf(0, fHz), spectrumOf(1, fHz));
      const total = emptySpectrum(fHz.length);
      parts.forEach((part, k) => {
        const y = spinWeightedHarmonic(part.l, part.m, inclinationRad, azimuthRad);
        addRotated(total, spectrumOf(k, fHz), y.re, y.im);
      });
      return total;
    },
    modes: (fHz): ModeSpectrum[] => parts.map((part, k) => ({ l: part.l, m: part.m, spectrum: spectrumOf(k, fHz) })),
  };
}

/** Plus and cross given as transforms at f > 0: x is plus itself, y is −cross (each was read as a one-sided half). */
function columns(plus: Spectrum, cross: Spectrum): Spectrum {
  const twice = (values: Float64Array, by: number): Float64Array => values.map((v) => by * v);
  return { xRe: twice(plus.xRe, 2), xIm: twice(plus.xIm, 2), yRe: twice(cross.xRe, -2), yIm: twice(cross.xIm, -2) };
}
