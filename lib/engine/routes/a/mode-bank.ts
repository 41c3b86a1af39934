import type { Side } from '@/lib/engine/contract/route';
import { spinWeightedHarmonic } from '@/lib/engine/modes/spin-weighted-harmonic';
import type { Numerics } from './numerics';
import { sideSpectrum } from './side-spectra';
import type { Spectrum } from './spectrum';
import type { SpectrumStore } from './spectrum-store';

interface BankedMode {
  readonly l: number;
  readonly m: number;
  readonly spectrum: Spectrum;
}

/** The spectra of all modes of one side, from which any line of sight is a sum. */
export type ModeBank = readonly BankedMode[];

/** Transforms every mode of one side at bins of width dF (1/unit of the axis) up to fTop; empty for content along a line of sight. */
export function modeBank(side: Side, dF: number, fTop: number, store: SpectrumStore, numerics: Numerics): ModeBank {
  const { content } = side.waveform;
  if (content.kind !== 'modes') return [];
  return content.modes.map(({ l, m }, index) => ({
    l,
    m,
    spectrum: sideSpectrum(side, { kind: 'mode', index }, dF, fTop, store, numerics),
  }));
}

function addMode(sum: Spectrum, mode: Spectrum, re: number, im: number, from: number, to: number): void {
  const { zRe, zIm, yRe, yIm } = mode;
  for (let k = from; k <= to; k++) {
    const [a, b, c, d] = [zRe[k]!, zIm[k]!, yRe[k]!, yIm[k]!];
    sum.zRe[k]! += re * a - im * b;
    sum.zIm[k]! += re * b + im * a;
    // Y = Z(−f)*, so it carries the harmonic's conjugate.
    sum.yRe[k]! += re * c + im * d;
    sum.yIm[k]! += re * d - im * c;
  }
}

/**
 * The spectrum along one line of sight, summed over modes bin by bin.
 * Shape:  bins from … to of a fresh spectrum are filled; others are zero.
 * Units:  those of the bank.
 * Error:  rounding.
 * Fails:  never; the bank must not be empty.
 * Source: h₊ − ih× = Σ H_lm ⁻²Y_lm.
 */
export function lineSpectrum(bank: ModeBank, inclinationRad: number, azimuthRad: number, from: number, to: number): Spectrum {
  const first = bank[0]!.spectrum;
  const n = first.zRe.length;
  const sum: Spectrum = {
    ...first,
    zRe: new Float64Array(n),
    zIm: new Float64Array(n),
    yRe: new Float64Array(n),
    yIm: new Float64Array(n),
  };
  for (const { l, m, spectrum } of bank) {
    const y = spinWeightedHarmonic(l, m, inclinationRad, azimuthRad);
    if (y.re !== 0 || y.im !== 0) addMode(sum, spectrum, y.re, y.im, from, to);
  }
  return sum;
}
