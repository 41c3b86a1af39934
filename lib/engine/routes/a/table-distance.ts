import type { ColumnReader } from './column-reader';
import { BB, DD, RE } from './node-lag';
import { CELL, NoiseExtremes } from './noise-extremes';
import type { NoiseWeigher } from './noise-weigher';

/** One mass: cells of the noise that the first cell of bins lies over, and ‖a‖‖b‖. */
export interface CellMark {
  readonly shift: number;
  readonly norm: number;
}

/** Power of each side over cells of ln k: each bin's, spread evenly over half a bin to either side, so that none is lost however the powers jump from bin to bin. */
function cellPowers(reader: ColumnReader, logFirst: number, cells: number, scales: readonly [number, number]): { a: Float64Array; b: Float64Array } {
  const own = [new Float64Array(1), new Float64Array(1), new Float64Array(1), new Float64Array(1)] as const;
  const [a, b] = [new Float64Array(cells), new Float64Array(cells)];
  let cell = 0;
  for (let k = Math.round(Math.exp(logFirst)); k <= reader.last && cell < cells; k++) {
    reader.bin(k, own);
    const [powerA, powerB] = [Math.max(0, own[DD][0]! + 2 * own[RE][0]! + own[BB][0]!) / scales[0] ** 2, own[BB][0]! / scales[1] ** 2];
    // A bin reaches over several cells where they are narrow; several bins lie in one where they are wide.
    for (let from = k - 0.5; from < k + 0.5 && cell < cells;) {
      const end = Math.exp(logFirst + (cell + 1) * CELL);
      const to = Math.min(end, k + 0.5);
      a[cell]! += (to - from) * powerA;
      b[cell]! += (to - from) * powerB;
      if (end <= k + 0.5) cell++;
      from = to;
    }
  }
  return { a, b };
}

/**
 * How far the normalised product at a mass can lie, at any lag, from the mean of those at two anchors, under a table with lines.
 * Shape:  a bound at a time, from the extremes of 1/S over cells of 0.002 in ln f.
 * Units:  of a normalised product.
 * Error:  an upper bound.
 * Fails:  never.
 * Source: |∫ a b* ΔV e^{iωτ}|² ≤ ∫|a|²|ΔV| · ∫|b|²|ΔV| (Cauchy and Schwarz).
 */
export class TableDistance {
  private readonly extremes: NoiseExtremes;
  private readonly powers: { readonly a: Float64Array; readonly b: Float64Array };
  private readonly logFirst: number;

  constructor(reader: ColumnReader, weigher: NoiseWeigher, fLowHz: number, fHighHz: number, scales: readonly [number, number]) {
    this.extremes = new NoiseExtremes(weigher, fLowHz, fHighHz);
    this.logFirst = Math.log(reader.lowest);
    this.powers = cellPowers(reader, this.logFirst, Math.ceil((Math.log(reader.last) - this.logFirst) / CELL), scales);
  }

  mark(dfHz: number, norm: number): CellMark {
    return { shift: Math.floor((this.logFirst + Math.log(dfHz) - this.extremes.logLow) / CELL), norm };
  }

  bound(own: CellMark, low: CellMark, high: CellMark, share: number): number {
    const { most, least } = this.extremes;
    const { a: aPower, b: bPower } = this.powers;
    const [perOwn, perLow, perHigh] = [1 / own.norm, (1 - share) / low.norm, share / high.norm];
    let a = 0;
    let b = 0;
    const end = most.length - 1;
    const within = (i: number): number => (i < 0 ? 0 : i > end ? end : i);
    for (let c = Math.max(0, -1 - Math.max(own.shift, low.shift, high.shift)); c < aPower.length; c++) {
      // A cell of bins lies over two cells of the noise.
      const i = within(c + own.shift + 2);
      const j = within(c + low.shift + 2);
      const k = within(c + high.shift + 2);
      const top = perLow * most[j]! + perHigh * most[k]!;
      const bottom = perLow * least[j]! + perHigh * least[k]!;
      const d = Math.max(perOwn * most[i]! - bottom, top - perOwn * least[i]!);
      a += d * aPower[c]!;
      b += d * bPower[c]!;
    }
    return Math.sqrt(a * b);
  }
}
