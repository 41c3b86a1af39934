import { transformOfSize } from '../fourier/transform';
import type { Finding } from '../contract/finding';
import { modeName, scientific, short } from './spelt';

/** One even series to be looked at; `im` is null for a lone real column. */
export interface EvenSeries {
  readonly axis: Float64Array;
  readonly re: Float64Array;
  readonly im: Float64Array | null;
}

const PIECE = 256;
const MOST_PIECES = 96;
/** Halves of the spectrum's top, as shares of the Nyquist frequency: where power should have died away, and where it must not come back. */
const VALLEY = [0.5, 0.8] as const;
const SUMMIT = [0.85, 1] as const;
const RISE = 10;
/** Amplitude in the top of the spectrum over that of the whole series: less is rounding. */
const LEAST_SHARE = 1e-6;

/** sin⁴: side lobes fall by 30 dB an octave, so a loud low frequency does not look like a floor. */
const window = Float64Array.from({ length: PIECE }, (_, i) => Math.sin((Math.PI * (i + 0.5)) / PIECE) ** 4);

function powerOfPiece({ re, im }: EvenSeries, from: number): Float64Array {
  const data = new Float64Array(2 * PIECE);
  const spectrum = new Float64Array(2 * PIECE);
  for (let i = 0; i < PIECE; i++) {
    data[2 * i] = window[i]! * re[from + i]!;
    data[2 * i + 1] = im === null ? 0 : window[i]! * im[from + i]!;
  }
  transformOfSize(PIECE).forward(spectrum, data);
  // Power at +f and −f together, from zero to Nyquist.
  return Float64Array.from({ length: PIECE / 2 + 1 }, (_, k) => {
    const j = (PIECE - k) % PIECE;
    const at = (q: number): number => spectrum[2 * q]! ** 2 + spectrum[2 * q + 1]! ** 2;
    return at(k) + (j === k ? 0 : at(j));
  });
}

const binsIn = ([low, high]: readonly [number, number]): number[] =>
  Array.from({ length: PIECE / 2 + 1 }, (_, k) => k).filter((k) => k >= low * (PIECE / 2) && k <= high * (PIECE / 2));

const meanOf = (values: readonly number[]): number => values.reduce((sum, x) => sum + x, 0) / values.length;

/** Mean over a few neighbouring bins, smallest of them: where the spectrum has come down furthest. */
function valleyOf(power: Float64Array): { readonly level: number; readonly at: number } {
  let found = { level: Infinity, at: 0 };
  for (const k of binsIn(VALLEY)) {
    const level = meanOf([...power.subarray(k - 2, k + 3)]);
    if (level < found.level) found = { level, at: k / (PIECE / 2) };
  }
  return found;
}

/**
 * V06: power that comes back towards the Nyquist frequency. The spectrum is that of at most 96
 * pieces of 256 samples spread over the record, so that a long record costs no more than a short one.
 */
export function aliasingFindings(series: EvenSeries, mode: { readonly l: number; readonly m: number } | null, unit: string, name: string): Finding[] {
  const { axis } = series;
  const n = axis.length;
  if (n < 2 * PIECE) return [];
  const count = Math.min(MOST_PIECES, Math.floor(n / PIECE) * 2 - 1);
  const total = new Float64Array(PIECE / 2 + 1);
  let [whole, loudest, loudestAt] = [0, -1, 0];
  const summit = binsIn(SUMMIT);
  for (let p = 0; p < count; p++) {
    const from = Math.round((p * (n - PIECE)) / (count - 1));
    const power = powerOfPiece(series, from);
    for (let k = 0; k < power.length; k++) [total[k], whole] = [total[k]! + power[k]!, whole + power[k]!];
    const here = meanOf(summit.map((k) => power[k]!));
    if (here > loudest) [loudest, loudestAt] = [here, axis[from + PIECE / 2]!];
  }
  const valley = valleyOf(total);
  const top = meanOf(summit.map((k) => total[k]!));
  const share = Math.sqrt((top * summit.length) / whole);
  if (!(top > RISE * valley.level && share > LEAST_SHARE)) return [];
  const what = mode === null ? `the strain of ${name}` : `${modeName(mode)} of ${name}`;
  return [
    {
      code: 'engine/aliasing',
      level: 'worth-a-look',
      where: name,
      text: `Power of ${what} rises again above ${short(valley.at, 2)} of the Nyquist frequency, ${short(top / valley.level, 2)}-fold towards its end, most of it around t = ${short(loudestAt)} ${unit} (${scientific(share)} of the amplitude of the record): probably start-up noise folded back by the sampling.`,
      fix: 'Filter the record before it is thinned, or supply it with its original step.',
    },
  ];
}
