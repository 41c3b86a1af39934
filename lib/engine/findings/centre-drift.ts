import type { Finding } from '../contract/finding';
import type { Mode } from '../contract/waveform';
import { short } from './spelt';

/** In a record whose centre has moved by D = x + iy across the line of sight, (2,1) gains D/3 of the rate of (2,2). */
const COUPLING = 1 / 3;
/** A drift of less is below what simulations are corrected to. */
const LEAST_DRIFT = 0.1;
/** The straight line must take away this share of what is left of (2,1) without it. */
const EXPLAINED = 0.5;
/** More samples than these say no more of a straight line. */
const MOST_SAMPLES = 6000;
/** The merger is left out: there the frequency changes within a cycle. */
const BEFORE_PEAK_M = 60;
/** Fewer cycles of (2,2) cannot tell a drift from the mode itself. */
const LEAST_CYCLES = 3;
/** A start-up burst is passed over. */
const START = 0.05;

/** Complex least squares by normal equations, columns of one row at a time. */
class ComplexFit {
  private readonly re: Float64Array;
  private readonly im: Float64Array;
  private readonly right: Float64Array;
  private power = 0;

  constructor(private readonly n: number) {
    [this.re, this.im, this.right] = [new Float64Array(n * n), new Float64Array(n * n), new Float64Array(2 * n)];
  }

  add(row: Float64Array, y: readonly [number, number]): void {
    const { n, re, im, right } = this;
    for (let i = 0; i < n; i++) {
      const [a, b] = [row[2 * i]!, row[2 * i + 1]!];
      for (let j = 0; j < n; j++) {
        const [c, d] = [row[2 * j]!, row[2 * j + 1]!];
        re[i * n + j] = re[i * n + j]! + a * c + b * d;
        im[i * n + j] = im[i * n + j]! + a * d - b * c;
      }
      right[2 * i] = right[2 * i]! + a * y[0] + b * y[1];
      right[2 * i + 1] = right[2 * i + 1]! + a * y[1] - b * y[0];
    }
    this.power += y[0] * y[0] + y[1] * y[1];
  }

  /** Coefficients of the first `n` columns, and what they leave of the power. */
  solve(n: number): { readonly x: readonly (readonly [number, number])[]; readonly left: number } {
    const at = (i: number, j: number): [number, number] => [this.re[i * this.n + j]!, this.im[i * this.n + j]!];
    const rows = Array.from({ length: n }, (_, i) => [...Array.from({ length: n }, (_, j) => at(i, j)), [this.right[2 * i]!, this.right[2 * i + 1]!] as [number, number]]);
    for (let k = 0; k < n; k++) {
      const best = rows.slice(k).reduce((p, row, i) => (Math.hypot(...row[k]!) > Math.hypot(...rows[p]![k]!) ? k + i : p), k);
      [rows[k], rows[best]] = [rows[best]!, rows[k]!];
      const pivot = rows[k]![k]!;
      for (let i = 0; i < n; i++) if (i !== k) eliminate(rows[i]!, rows[k]!, divided(rows[i]![k]!, pivot));
    }
    const x = rows.map((row, i) => divided(row[n]!, row[i]!));
    const explained = x.reduce((sum, [a, b], i) => sum + a * this.right[2 * i]! + b * this.right[2 * i + 1]!, 0);
    return { x, left: Math.max(0, this.power - explained) };
  }
}

function divided([a, b]: readonly [number, number], [c, d]: readonly [number, number]): [number, number] {
  const size = c * c + d * d;
  return [(a * c + b * d) / size, (b * c - a * d) / size];
}

function eliminate(row: [number, number][], by: readonly [number, number][], [a, b]: readonly [number, number]): void {
  for (let j = 0; j < row.length; j++) {
    const [c, d] = by[j]!;
    row[j] = [row[j]![0] - (a * c - b * d), row[j]![1] - (a * d + b * c)];
  }
}

interface Track {
  readonly indices: readonly number[];
  readonly phase: Float64Array;
}

/** Samples of the inspiral that are used, and the unwrapped phase of (2,2). */
function inspiralOf(axis: Float64Array, { re, im }: Mode): Track | null {
  const phase = new Float64Array(axis.length);
  let [top, peak] = [0, 0];
  for (let i = 0; i < axis.length; i++) {
    const size = re[i]! * re[i]! + im[i]! * im[i]!;
    if (size > top) [top, peak] = [size, i];
    if (i > 0) phase[i] = phase[i - 1]! + Math.atan2(im[i]! * re[i - 1]! - re[i]! * im[i - 1]!, re[i]! * re[i - 1]! + im[i]! * im[i - 1]!);
  }
  const from = Math.max(1, axis.findIndex((t) => t >= axis[0]! + START * (axis[peak]! - axis[0]!)));
  const to = axis.findIndex((t) => t >= axis[peak]! - BEFORE_PEAK_M);
  if (!(to - from > 50) || Math.abs(phase[to]! - phase[from]!) < 2 * Math.PI * LEAST_CYCLES) return null;
  const stride = Math.max(1, Math.ceil((to - from) / MOST_SAMPLES));
  return { indices: Array.from({ length: Math.ceil((to - from) / stride) }, (_, k) => from + k * stride), phase };
}

export interface Drift {
  /** Over the whole record, in M. */
  readonly drift: number;
  readonly fromM: number;
  readonly toM: number;
}

/**
 * How far the centre moves, from the part of (2,1) that turns with (2,2) and grows steadily. (2,1)
 * itself turns at half the rate; both are fitted at once, its amplitude as a cubic in time.
 * Source: Boyle 2016, arXiv:1509.00862 [from memory]; the coupling is the matrix element of n between the two harmonics.
 */
export function centreDrift(axis: Float64Array, modes: readonly Mode[]): Drift | null {
  const quadrupole = modes.find(({ l, m }) => l === 2 && m === 2);
  const odd = modes.find(({ l, m }) => l === 2 && m === 1);
  const track = quadrupole && inspiralOf(axis, quadrupole);
  if (!quadrupole || !odd || !track) return null;
  const { indices, phase } = track;
  const [first, last] = [axis[indices[0]!]!, axis[indices[indices.length - 1]!]!];
  const fit = new ComplexFit(6);
  const row = new Float64Array(12);
  for (const i of indices) {
    const s = (2 * (axis[i]! - first)) / (last - first) - 1;
    const span = axis[i + 1]! - axis[i - 1]!;
    const rate = [(quadrupole.re[i + 1]! - quadrupole.re[i - 1]!) / span, (quadrupole.im[i + 1]! - quadrupole.im[i - 1]!) / span] as const;
    // Everything over the rate of (2,2): the drift is then a straight line, (2,1) turns backwards at half the phase.
    const y = divided([odd.re[i]!, odd.im[i]!], rate);
    const [c, d] = [Math.cos(phase[i]! / 2), -Math.sin(phase[i]! / 2)];
    for (let p = 0, power = 1; p < 4; p++, power *= s) [row[2 * p], row[2 * p + 1]] = [power * c, power * d];
    [row[8], row[9], row[10], row[11]] = [1, 0, s, 0];
    if (rate[0] !== 0 || rate[1] !== 0) fit.add(row, y);
  }
  const [withLine, withOffset] = [fit.solve(6), fit.solve(5)];
  if (!(withLine.left < EXPLAINED * withOffset.left)) return null;
  const drift = ((Math.hypot(...withLine.x[5]!) * 2) / COUPLING) * ((axis[axis.length - 1]! - axis[0]!) / (last - first));
  return { drift, fromM: first, toM: last };
}

/** V17, for what sums products of neighbouring modes. */
export function centreDriftFindings(axis: Float64Array, modes: readonly Mode[], name: string): Finding[] {
  const found = centreDrift(axis, modes);
  if (found === null || !(found.drift > LEAST_DRIFT)) return [];
  return [
    {
      code: 'engine/centre-drift',
      level: 'worth-a-look',
      where: name,
      text: `In (2,1) of ${name} a part that turns with (2,2) grows steadily from t = ${short(found.fromM, 6)} to ${short(found.toM, 6)} M: the centre of mass drifts, by about ${short(found.drift, 2)} M over the record.`,
      fix: 'Remove the motion of the centre of mass from the modes, above all before a recoil is claimed.',
    },
  ];
}
