import type { Side, Sight } from '../../contract/route';
import { spinWeightedHarmonic } from '../../modes/spin-weighted-harmonic';
import { channelsOf } from './channels';
import { addRotated, emptySpectrum, type ModeSpectrum, type Source, type Spectrum } from './spectrum';

/** p = z(f) and q = z(−f)* of one mode, or of the modes of one m, at the nodes. */
export interface Element {
  readonly pRe: Float64Array;
  readonly pIm: Float64Array;
  readonly qRe: Float64Array;
  readonly qIm: Float64Array;
  readonly weigh: (sight: Sight) => readonly [re: number, im: number];
}

export type Complex = readonly [re: number, im: number];

function elementOf(spectrum: Spectrum, weigh: Element['weigh']): Element {
  const [p, q] = channelsOf(spectrum, 'complex');
  return { pRe: p!.re, pIm: p!.im, qRe: q!.re, qIm: q!.im, weigh };
}

function groupedByM(modes: readonly ModeSpectrum[], inclinationRad: number, n: number): Element[] {
  const groups = new Map<number, Spectrum>();
  for (const { l, m, spectrum } of modes) {
    const sum = groups.get(m) ?? emptySpectrum(n);
    groups.set(m, sum);
    addRotated(sum, spectrum, spinWeightedHarmonic(l, m, inclinationRad, 0).re, 0);
  }
  return [...groups].map(([m, spectrum]) => elementOf(spectrum, ({ azimuthRad }) => [Math.cos(m * azimuthRad), Math.sin(m * azimuthRad)]));
}

const powerOf = ({ pRe, pIm, qRe, qIm }: Element, weight: Float64Array): number =>
  weight.reduce((sum, w, i) => sum + w * (pRe[i]! ** 2 + pIm[i]! ** 2 + qRe[i]! ** 2 + qIm[i]! ** 2), 0);

/** Parts weaker than this share of the strongest, in power, are below the rounding of the others. */
const SILENT = 1e-20;

/**
 * A side as parts that a direction only multiplies.
 * Shape:  one inclination: a part for each m; otherwise one for each mode; a column is one part.
 * Units:  strain per Hz.
 * Error:  none.
 * Fails:  never; a silent side has no parts.
 * Source: settings.md rule 2.2; ⁻²Y_lm(ι, 0) is real.
 */
export function partsOf(side: Side, source: Source, f: Float64Array, weight: Float64Array, inclinationRad: number | null): Element[] {
  const one = (): Element[] => [elementOf(source.line(side.inclinationRad, side.azimuthRad, f), () => [1, 0])];
  const each = (): Element[] =>
    source.modes(f).map(({ l, m, spectrum }) =>
      elementOf(spectrum, (sight) => {
        const { re, im } = spinWeightedHarmonic(l, m, sight.inclinationRad, sight.azimuthRad);
        return [re, im];
      }),
    );
  const parts = side.waveform.content.kind !== 'modes' ? one() : inclinationRad === null ? each() : groupedByM(source.modes(f), inclinationRad, f.length);
  const powers = parts.map((part) => powerOf(part, weight));
  const floor = SILENT * Math.max(...powers);
  return parts.filter((_, i) => powers[i]! > floor);
}
