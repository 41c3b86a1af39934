import type { BinColumns } from './compressed-bins';

/** Points of the interpolation. */
const POINTS = 10;
/** Bins to either side of a place that it may need. */
export const READER_REACH = POINTS / 2;

/** Π over the other points of (own − other), inverted, of ten points one apart. */
const inverse = Float64Array.from({ length: POINTS }, (_, j) => {
  let product = 1;
  for (let i = 0; i < POINTS; i++) if (i !== j) product *= j - i;
  return 1 / product;
});

/** The four columns of an aligned pair at places between bins, side by side for that. */
export class ColumnReader {
  private readonly data: Float64Array;
  private readonly share = new Float64Array(POINTS);

  /** Beyond the columns' end counts as zero, as far as `last` and a reach more. */
  constructor(
    { first, columns }: BinColumns,
    readonly last: number,
  ) {
    this.first = first;
    const n = last + 2 * READER_REACH - first + 1;
    this.data = new Float64Array(4 * n);
    for (let c = 0; c < 4; c++) {
      const column = columns[c]!;
      for (let k = 0, end = Math.min(n, column.length); k < end; k++) this.data[4 * k + c] = column[k]!;
    }
  }

  readonly first: number;

  /** Lowest place that may be read. */
  get lowest(): number {
    return this.first + READER_REACH;
  }

  /** Lagrange's weights at x among the points 0 … 9. */
  private weigh(x: number): void {
    const { share } = this;
    let product = 1;
    for (let i = 0; i < POINTS; i++) {
      share[i] = product * inverse[i]!;
      product *= x - i;
    }
    product = 1;
    for (let i = POINTS - 1; i >= 0; i--) {
      share[i] = share[i]! * product;
      product *= x - i;
    }
  }

  /** All four at one bin as they stand. */
  bin(k: number, out: readonly [Float64Array, Float64Array, Float64Array, Float64Array]): void {
    const o = 4 * (k - this.first);
    for (let c = 0; c < 4; c++) out[c]![0] = this.data[o + c]!;
  }

  /** Reads all four at one place into `out`, each at `at` of its own. */
  read(place: number, out: readonly [Float64Array, Float64Array, Float64Array, Float64Array], at: number): void {
    if (!(place < this.last)) {
      for (let c = 0; c < 4; c++) out[c]![at] = 0;
      return;
    }
    const start = Math.floor(place) - READER_REACH + 1;
    this.weigh(place - start);
    const { data, share } = this;
    let [p, q, r, s] = [0, 0, 0, 0];
    for (let i = 0, o = 4 * (start - this.first); i < POINTS; i++, o += 4) {
      const w = share[i]!;
      p += w * data[o]!;
      q += w * data[o + 1]!;
      r += w * data[o + 2]!;
      s += w * data[o + 3]!;
    }
    out[0][at] = p;
    out[1][at] = q;
    out[2][at] = r;
    out[3][at] = s;
  }
}
