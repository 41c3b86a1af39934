import type { Side, Sight } from '@/lib/engine/contract/route';
import { spinWeightedHarmonic } from '@/lib/engine/modes/spin-weighted-harmonic';
import type { BinWeights } from './bin-weights';
import { lineSpectrum, type ModeBank } from './mode-bank';
import type { Spectrum } from './spectrum';

export interface Weight {
  readonly re: number;
  readonly im: number;
}

/** What a sight multiplies a part by; holds no spectrum, so that tables may outlive those. */
export type Weigh = (sight: Sight) => Weight;

/** A part of a waveform that a sight only multiplies by a number: a mode, all modes of one m at one inclination, or a column. */
export interface Element {
  readonly spectrum: Spectrum;
  readonly weigh: Weigh;
}

const byHarmonic = (l: number, m: number): Weigh => (sight) => spinWeightedHarmonic(l, m, sight.inclinationRad, sight.azimuthRad);
const byAzimuth = (m: number): Weigh => ({ azimuthRad }) => ({ re: Math.cos(m * azimuthRad), im: Math.sin(m * azimuthRad) });
const asItStands: Weigh = () => ({ re: 1, im: 0 });

/** Beside the whole, an element of less than this part of the power changes no match that could be told apart. */
const NOTHING = 1e-20;

function sumsByM(bank: ModeBank, inclinationRad: number, from: number, to: number): Element[] {
  return [...new Set(bank.map(({ m }) => m))].map((m) => ({
    spectrum: lineSpectrum(
      bank.filter((mode) => mode.m === m),
      inclinationRad,
      0,
      from,
      to,
    ),
    weigh: byAzimuth(m),
  }));
}

/** Σ V (z_a z_b* e^{iωt} + its partner at −f) at t = 0. */
export function innerProduct(a: Spectrum, b: Spectrum, { first, values }: BinWeights): { re: number; im: number } {
  let [re, im] = [0, 0];
  for (let j = 0; j < values.length; j++) {
    const k = first + j;
    const [p, q, r, s] = [a.zRe[k]!, a.zIm[k]!, b.zRe[k]!, b.zIm[k]!];
    const [t, u, v, w] = [a.yRe[k]!, a.yIm[k]!, b.yRe[k]!, b.yIm[k]!];
    re += values[j]! * (p * r + q * s + t * v + u * w);
    im += values[j]! * (q * r - p * s - u * v + t * w);
  }
  return { re, im };
}

function withoutSilent(elements: readonly Element[], weights: BinWeights): Element[] {
  const powers = elements.map(({ spectrum }) => innerProduct(spectrum, spectrum, weights).re);
  const top = Math.max(...powers);
  return elements.filter((_, i) => powers[i]! > NOTHING * top);
}

/**
 * Splits a side into elements; a column along a line of sight is one element of weight 1.
 * Shape:  `bank` is empty for columns, and `line` is then used; bins up to `margin` outside the band are filled.
 * Units:  those of the spectra.
 * Error:  none; elements that are silent in the band are left out.
 * Fails:  never; a silent side gives no elements.
 * Source: h₊ − ih× = Σ H_lm ⁻²Y_lm(ι, φ) = Σ_m e^{imφ} Σ_l H_lm ⁻²Y_lm(ι, 0).
 */
export function elementsOf(side: Side, bank: ModeBank, line: Spectrum, inclinationRad: number | null, weights: BinWeights, margin: number): Element[] {
  const last = weights.first + weights.values.length - 1;
  if (side.waveform.content.kind !== 'modes') return [{ spectrum: line, weigh: asItStands }];
  const elements =
    inclinationRad === null
      ? bank.map(({ l, m, spectrum }): Element => ({ spectrum, weigh: byHarmonic(l, m) }))
      : bank.length === 0
        ? []
        : sumsByM(bank, inclinationRad, Math.max(bank[0]!.spectrum.firstBin, weights.first - margin), Math.min(bank[0]!.spectrum.lastBin, last + margin));
  return withoutSilent(elements, weights);
}

const formOf =
  (table: readonly (readonly Weight[])[]) =>
  (c: readonly Weight[]): number => {
    let sum = 0;
    for (let j = 0; j < c.length; j++) {
      for (let k = 0; k < c.length; k++) {
        const { re, im } = table[j]![k]!;
        sum += (c[j]!.re * c[k]!.re + c[j]!.im * c[k]!.im) * re - (c[j]!.im * c[k]!.re - c[j]!.re * c[k]!.im) * im;
      }
    }
    return sum;
  };

/** Hermitian matrix of the products of elements, for norms. */
export const gramOfElements = (elements: readonly Element[], weights: BinWeights): ((weights: readonly Weight[]) => number) =>
  formOf(elements.map((a) => elements.map((b) => innerProduct(a.spectrum, b.spectrum, weights))));
