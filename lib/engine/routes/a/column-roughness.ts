import { chebyshevRule } from './chebyshev-rule';
import type { ColumnReader } from './column-reader';
import { BB, IM, RE } from './node-lag';
import { ORDER, WIDEST } from './noise-blocks';

/** Turn of the phase over half the widest block that its nodes carry to the last digits. */
export const EXACT_TURN_RAD = 0.6;
/** Blocks of fewer bins do not show by themselves what the reader misses between bins. */
const FEW_BINS = 48;
/** Ten-point interpolation half-way between bins misses this part of the tenth difference. */
const MISSED = 2.5e-4;
const TENTH = [1, -10, 45, -120, 210, -252, 210, -120, 45, -10, 1];
const PHASE = 0.5;

type Four = readonly [Float64Array, Float64Array, Float64Array, Float64Array];
const four = (n: number): Four => [new Float64Array(n), new Float64Array(n), new Float64Array(n), new Float64Array(n)];
const [nodes, series, own] = [four(ORDER), four(ORDER), four(1)];

/** Turned product, |D|² and |b|² in place of the columns. */
function turn(at: Four, i: number, c: number, s: number): void {
  const re = at[RE][i]! + at[BB][i]!;
  const im = at[IM][i]!;
  at[RE][i] = re * c - im * s;
  at[IM][i] = re * s + im * c;
}

/** Chebyshev coefficients of the polynomials through the nodes. */
function toSeries(): void {
  const { points } = chebyshevRule(ORDER);
  for (let m = 0; m < ORDER; m++) {
    const sums = [0, 0, 0, 0];
    for (let j = 0; j < ORDER; j++) {
      const t = Math.cos(m * Math.acos(points[j]!));
      for (let c = 0; c < 4; c++) sums[c]! += t * nodes[c]![j]!;
    }
    for (let c = 0; c < 4; c++) series[c]![m] = ((m === 0 ? 1 : 2) / ORDER) * sums[c]!;
  }
}

function valueAt(coefficients: Float64Array, x: number): number {
  let [p, q] = [0, 0];
  for (let m = ORDER - 1; m > 0; m--) {
    const next = 2 * x * p - q + coefficients[m]!;
    q = p;
    p = next;
  }
  return x * p - q + coefficients[0]!;
}

/** What ten points around a bin miss between it and the next. */
function missedAt(reader: ColumnReader, bin: number): number {
  let worst = 0;
  const sums = [0, 0, 0, 0];
  TENTH.forEach((count, i) => {
    reader.bin(bin + i - 5, own);
    for (let c = 0; c < 4; c++) sums[c]! += count * own[c]![0]!;
  });
  for (const sum of sums) worst = Math.max(worst, MISSED * Math.abs(sum));
  return worst;
}

/** How far the columns, turned by a phase, are at most from polynomials through the nodes of one block. */
function worstOver(reader: ColumnReader, middle: number, half: number): number {
  const { points } = chebyshevRule(ORDER);
  const turnPer = (EXACT_TURN_RAD * half) / (WIDEST * reader.last);
  for (let j = 0; j < ORDER; j++) {
    reader.read(middle + half * points[j]!, nodes, j);
    turn(nodes, j, Math.cos(turnPer * points[j]! + PHASE), Math.sin(turnPer * points[j]! + PHASE));
  }
  toSeries();
  const [from, to] = [Math.max(reader.lowest, Math.ceil(middle - half)), Math.min(reader.last - 1, Math.floor(middle + half))];
  const [stepC, stepS] = [Math.cos(turnPer / half), Math.sin(turnPer / half)];
  const start = (turnPer * (from - middle)) / half + PHASE;
  let [cos, sin] = [Math.cos(start), Math.sin(start)];
  let worst = 0;
  for (let k = from; k <= to; k++) {
    const x = (k - middle) / half;
    reader.bin(k, own);
    turn(own, 0, cos, sin);
    const next = cos * stepC - sin * stepS;
    sin = cos * stepS + sin * stepC;
    cos = next;
    for (let c = 0; c < 4; c++) worst = Math.max(worst, Math.abs(valueAt(series[c]!, x) - own[c]![0]!));
  }
  if (to - from < FEW_BINS) for (let k = from; k <= to; k++) worst = Math.max(worst, missedAt(reader, k));
  return worst;
}

/** How rough the columns are, by block and place: tried where a band first asks, at blocks that overlap by half. */
export class ColumnRoughness {
  private readonly tried: (number | undefined)[][] = [];

  constructor(private readonly reader: ColumnReader) {}

  private trial(level: number, place: number): number {
    const list = (this.tried[level] ??= []);
    const width = WIDEST / 2 ** level;
    const middle = this.reader.lowest * Math.exp(place * width);
    return (list[place] ??= worstOver(this.reader, middle, width * middle));
  }

  /** The largest distance from a polynomial in a block as wide as blocks of a level are, around a place. */
  around(level: number, middle: number): number {
    const place = Math.log(middle / this.reader.lowest) / (WIDEST / 2 ** level);
    const [low, high] = [Math.max(0, Math.floor(place)), Math.max(0, Math.ceil(place))];
    return Math.max(this.trial(level, low), this.trial(level, high));
  }
}
