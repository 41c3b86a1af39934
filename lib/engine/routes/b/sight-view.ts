import type { Sight } from '../../contract/route';
import { goldenMaximum } from './climb-hill';
import { TERMS, type ShiftSeries } from './shift-series';
import type { Complex } from './sight-elements';
import type { Table } from './sight-table';

export interface Tried {
  readonly sight: Sight;
  readonly shiftS: number;
  readonly value: number;
}

/** a from one direction against b from any, as polynomials in the shift. */
export class View {
  private readonly sums = new Map<ShiftSeries, Float64Array>();
  private readonly weights: readonly Complex[];
  readonly power: number;

  constructor(
    readonly table: Table,
    sight: Sight,
  ) {
    this.weights = table.a.map((part) => part.weigh(sight));
    this.power = table.formA(this.weights);
  }

  private sumsOf(series: ShiftSeries): Float64Array {
    const known = this.sums.get(series);
    if (known) return known;
    const n = 2 * TERMS * this.table.b.length;
    const out = new Float64Array(n);
    this.weights.forEach(([re, im], j) => {
      for (let i = 0; i < n; i += 2) {
        const [x, y] = [series.coefficients[j * n + i]!, series.coefficients[j * n + i + 1]!];
        out[i] = out[i]! + re * x - im * y;
        out[i + 1] = out[i + 1]! + re * y + im * x;
      }
    });
    this.sums.set(series, out);
    return out;
  }

  /** The polynomial of one pose on one series. */
  private polynomial(series: ShiftSeries, c: readonly Complex[]): Float64Array {
    const sums = this.sumsOf(series);
    const out = new Float64Array(2 * TERMS);
    c.forEach(([re, im], k) => {
      for (let i = 0; i < out.length; i += 2) {
        const [x, y] = [sums[2 * TERMS * k + i]!, sums[2 * TERMS * k + i + 1]!];
        out[i] = out[i]! + re * x + im * y;
        out[i + 1] = out[i + 1]! + re * y - im * x;
      }
    });
    return out;
  }

  private read(polynomial: Float64Array, y: number): number {
    let [re, im] = [0, 0];
    for (let i = polynomial.length - 2; i >= 0; i -= 2) [re, im] = [re * y + polynomial[i]!, im * y + polynomial[i + 1]!];
    return this.table.freedom.turn ? Math.hypot(re, im) : re;
  }

  /** The match with b from a direction at given shifts, the best of them. */
  at(sight: Sight, shifts: readonly number[]): Tried {
    const { table } = this;
    const c = table.b.map((part) => part.weigh(sight));
    const scale = Math.sqrt(this.power * table.formB(c));
    const known = new Map<ShiftSeries, Float64Array>();
    const tried = shifts.map((shiftS): Tried => {
      const series = table.seriesAt(shiftS);
      const polynomial = known.get(series) ?? this.polynomial(series, c);
      known.set(series, polynomial);
      return { sight, shiftS, value: this.read(polynomial, (shiftS - series.centre) / table.reachS) / scale };
    });
    return tried.reduce((best, next) => (next.value > best.value ? next : best));
  }

  /** The hill that a shift stands on, by golden section. */
  hill(sight: Sight, shiftS: number, within: number): Tried {
    const top = goldenMaximum((s) => this.at(sight, [s]).value, shiftS - within, shiftS + within, 1e-7 * this.table.halfCycleS);
    return this.at(sight, [top.x[0]!]);
  }

  /** No direction of b gives more at these shifts: `sizes` holds, by inclination, each part's largest weight over the smallest norm. */
  ceiling(sizes: readonly (readonly number[])[], shifts: readonly number[]): number {
    const { table } = this;
    const n = table.b.length;
    const moduli = new Float64Array(n);
    let most = 0;
    for (const shiftS of shifts) {
      const series = table.seriesAt(shiftS);
      const sums = this.sumsOf(series);
      const y = (shiftS - series.centre) / table.reachS;
      for (let k = 0; k < n; k++) moduli[k] = modulusAt(sums, 2 * TERMS * k, y);
      for (const size of sizes) {
        let sum = 0;
        for (let k = 0; k < n; k++) sum += moduli[k]! * size[k]!;
        if (sum > most) most = sum;
      }
    }
    return most / Math.sqrt(this.power);
  }
}

/** |Σ_p c_p y^p| of the series that begins at a place. */
function modulusAt(sums: Float64Array, from: number, y: number): number {
  let re = 0;
  let im = 0;
  for (let i = from + 2 * TERMS - 2; i >= from; i -= 2) {
    re = re * y + sums[i]!;
    im = im * y + sums[i + 1]!;
  }
  return Math.hypot(re, im);
}
