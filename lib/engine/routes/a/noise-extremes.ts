import type { NoiseWeigher } from './noise-weigher';

/** Steps in ln f, and in ln of a bin, of the bound between two anchors. */
export const CELL = 0.002;

/** Largest and smallest 1/S of a table's band over any two neighbouring cells, [second cell + 1]; outside the band, and so at both ends, it is zero. */
export class NoiseExtremes {
  readonly logLow: number;
  readonly most: Float64Array;
  readonly least: Float64Array;

  constructor(weigher: NoiseWeigher, fLowHz: number, fHighHz: number) {
    this.logLow = Math.log(fLowHz);
    const cells = Math.ceil((Math.log(fHighHz) - this.logLow) / CELL);
    const [most, least] = [new Float64Array(cells), new Float64Array(cells)];
    // A row is a power law: its extremes are at its ends and where a cell cuts it.
    let i = weigher.firstKinkAbove(fLowHz);
    for (let c = 0; c < cells; c++) {
      const [from, to] = [this.logLow + c * CELL, Math.min(Math.log(fHighHz), this.logLow + (c + 1) * CELL)];
      let high = weigher.continuedAt(i, -1, from);
      let low = high;
      for (; i < weigher.kinksHz.length && Math.log(weigher.kinksHz[i]!) <= to; i++) {
        const at = weigher.continuedAt(i, -1, Math.log(weigher.kinksHz[i]!));
        [high, low] = [Math.max(high, at), Math.min(low, at)];
      }
      const end = weigher.continuedAt(i, -1, to);
      [most[c], least[c]] = [Math.max(high, end), Math.min(low, end)];
    }
    // The last cell holds the band's end.
    least[cells - 1] = 0;
    this.most = Float64Array.from({ length: cells + 3 }, (_, i) => Math.max(most[i - 1] ?? 0, most[i - 2] ?? 0));
    this.least = Float64Array.from({ length: cells + 3 }, (_, i) => Math.min(least[i - 1] ?? 0, least[i - 2] ?? 0));
  }
}
