import { powerOfTwoFrom, transformOfSize } from '@/lib/engine/fourier/transform';
import type { CrossSpectrum } from './cross-spectrum';
import type { LagSums } from './lag-sums';

/** What is maximised over the shift: the modulus (a phase or rotation is free) or the real part (it is not). */
export type Objective = 'modulus' | 'real';

export interface LagPeak {
  /** Shift in cycles per bin. */
  readonly x: number;
  readonly re: number;
  readonly im: number;
  readonly value: number;
}

const TURN = 2 * Math.PI;
/** Sines are taken anew every so many bins; between them a recurrence is exact to 1e-15. */
const BLOCK = 256;

/** Adds Σ q_j e^{±2πi(first+j)x} and its first two derivatives in x (in units of 2π) to the sums. */
function accumulate(sums: LagSums, re: Float64Array, im: Float64Array, first: number, x: number, sign: 1 | -1): void {
  const n = re.length;
  const stepRe = Math.cos(TURN * x);
  const stepIm = sign * Math.sin(TURN * x);
  let s0r = 0;
  let s0i = 0;
  let s1r = 0;
  let s1i = 0;
  let s2r = 0;
  let s2i = 0;
  for (let from = 0; from < n; from += BLOCK) {
    const to = Math.min(n, from + BLOCK);
    const start = (first + from) * x;
    const turns = start - Math.round(start);
    let er = Math.cos(TURN * turns);
    let ei = sign * Math.sin(TURN * turns);
    for (let j = from; j < to; j++) {
      const vr = re[j]! * er - im[j]! * ei;
      const vi = re[j]! * ei + im[j]! * er;
      const k = first + j;
      s0r += vr;
      s0i += vi;
      s1r += k * vr;
      s1i += k * vi;
      s2r += k * k * vr;
      s2i += k * k * vi;
      const next = er * stepRe - ei * stepIm;
      ei = er * stepIm + ei * stepRe;
      er = next;
    }
  }
  sums.re += s0r;
  sums.im += s0i;
  // d/dx of e^{±iω} is ±ik e^{±iω}.
  sums.re1 -= sign * s1i;
  sums.im1 += sign * s1r;
  sums.re2 -= s2r;
  sums.im2 -= s2i;
}

/** c(x) and its derivatives with respect to 2πx. */
export function evaluateAt(c: CrossSpectrum, x: number): LagSums {
  const sums = { re: 0, im: 0, re1: 0, im1: 0, re2: 0, im2: 0 };
  accumulate(sums, c.plusRe, c.plusIm, c.first, x, 1);
  if (c.minusRe !== null && c.minusIm !== null) accumulate(sums, c.minusRe, c.minusIm, c.first, x, -1);
  return sums;
}

const objectiveValue = (d: LagSums, objective: Objective): number => (objective === 'real' ? d.re : d.re * d.re + d.im * d.im);

/** Newton steps on |c|² or Re c; a step that would leave the cell or does not climb is halved. */
function climb(c: CrossSpectrum, start: number, cell: number, objective: Objective): LagPeak {
  let x = start;
  let d = evaluateAt(c, x);
  for (let round = 0; round < 40; round++) {
    const slope = objective === 'real' ? d.re1 : 2 * (d.re * d.re1 + d.im * d.im1);
    const bend = objective === 'real' ? d.re2 : 2 * (d.re1 * d.re1 + d.im1 * d.im1 + d.re * d.re2 + d.im * d.im2);
    let step = bend < 0 ? -slope / bend / TURN : Math.sign(slope) * cell * 0.25;
    step = Math.max(-cell, Math.min(cell, step));
    // Newton converges quadratically: from a thousandth of a cell one more step leaves 1e-6 of it, and the value within 1e-12.
    if (Math.abs(step) < 1e-3 * cell) return peakAt(evaluateAt(c, x + step), x + step, objective);
    let next = evaluateAt(c, x + step);
    for (
      let halving = 0;
      halving < 30 && objectiveValue(next, objective) < objectiveValue(d, objective) && Math.abs(step) > 1e-9 * cell;
      halving++
    ) {
      step /= 2;
      next = evaluateAt(c, x + step);
    }
    if (objectiveValue(next, objective) >= objectiveValue(d, objective)) [x, d] = [x + step, next];
  }
  return peakAt(d, x, objective);
}

const peakAt = (d: LagSums, x: number, objective: Objective): LagPeak => ({
  x,
  re: d.re,
  im: d.im,
  value: objective === 'real' ? d.re : Math.hypot(d.re, d.im),
});

interface Core {
  /** Σ of sizes over all bins. */
  readonly total: number;
  readonly from: number;
  readonly to: number;
}

/** |re| + |im| of both sides at one bin: at most √2 times the modulus. */
function sizeAt(c: CrossSpectrum, j: number): number {
  const plus = Math.abs(c.plusRe[j]!) + Math.abs(c.plusIm[j]!);
  return c.minusRe === null ? plus : plus + Math.abs(c.minusRe[j]!) + Math.abs(c.minusIm![j]!);
}

/** The total is needed to a few per cent only. */
const CORE_SAMPLE = 4;

/** The bins that hold all but a hundredth of Σ|c_j|: only they are needed to find the cell of the maximum. */
function coreOf(c: CrossSpectrum): Core {
  let total = 0;
  for (let j = 0; j < c.n; j += CORE_SAMPLE) total += CORE_SAMPLE * sizeAt(c, j);
  let to = c.n;
  for (let left = 0; to > 1 && (left += sizeAt(c, to - 1)) < 0.005 * total;) to--;
  let from = 0;
  for (let left = 0; from < to - 1 && (left += sizeAt(c, from)) < 0.005 * total;) from++;
  return { from, to, total };
}

interface Scratch {
  readonly data: Float64Array;
  readonly out: Float64Array;
  readonly values: Float64Array;
}

/** Buffers of the last size used: a sweep asks for the same one hundreds of times. */
let scratch: Scratch | null = null;
function scratchOf(size: number): Scratch {
  if (scratch?.values.length !== size)
    scratch = { data: new Float64Array(2 * size), out: new Float64Array(2 * size), values: new Float64Array(size) };
  scratch.data.fill(0);
  return scratch;
}

/** |c|² or Re c on a grid of shifts, at least 2·finer times as fine as the core's bandwidth, from every stride-th bin. */
function coarseGrid(c: CrossSpectrum, core: Omit<Core, 'total'>, objective: Objective, stride: number, finer = 1): Float64Array {
  const { plusRe, plusIm, minusRe, minusIm, first } = c;
  const oneSided = objective === 'modulus' && minusRe === null;
  const from = Math.ceil((first + core.from) / stride);
  const to = Math.floor((first + core.to - 1) / stride) + 1;
  // With one side and a free phase the carrier drops out, and the band may be moved to bin 0.
  const moved = oneSided ? from : 0;
  const size = finer * powerOfTwoFrom(oneSided ? 2 * (to - from) : 4 * to);
  const { data, out, values } = scratchOf(size);
  for (let k = from; k < to; k++) {
    const j = k * stride - first;
    data[2 * (k - moved)]! += plusRe[j]!;
    data[2 * (k - moved) + 1]! += plusIm[j]!;
  }
  if (minusRe !== null && minusIm !== null) {
    for (let k = from; k < to; k++) {
      const j = k * stride - first;
      data[2 * (size - k)]! += minusRe[j]!;
      data[2 * (size - k) + 1]! += minusIm[j]!;
    }
  }
  transformOfSize(size).inverse(out, data);
  if (objective === 'real') for (let i = 0; i < size; i++) values[i] = out[2 * i]!;
  else for (let i = 0; i < size; i++) values[i] = out[2 * i]! * out[2 * i]! + out[2 * i + 1]! * out[2 * i + 1]!;
  return values;
}

/** Beyond this share of the strided bins' period a lag may stand for the one a period away; both are tried. */
const UNMISTAKABLE = 0.05;

/** Shifts in cycles per bin that a grid point may stand for. */
function shiftsOf(place: number, n: number, stride: number): number[] {
  const y = (place > n / 2 ? place - n : place) / n;
  return stride === 1 || Math.abs(y) <= UNMISTAKABLE ? [y / stride] : [y / stride, (y - Math.sign(y)) / stride];
}

/** Where the parabola through three neighbours peaks, from the middle one: saves a Newton step over all bins. */
function vertexBeside(before: number, at: number, after: number): number {
  const bend = before - 2 * at + after;
  return bend < 0 ? Math.max(-0.5, Math.min(0.5, (before - after) / (2 * bend))) : 0;
}

const MOST_CANDIDATES = 24;
/**
 * Below this share of Σ|c_j|, signals match so little that hills of nearly one height may stand closer than twofold
 * oversampling of |c| shows (two of equal height a cell apart reach 0.785 of it; sizes are 4/π larger on average),
 * and what the core leaves out may decide which is the higher: then every bin is taken, on a finer grid.
 */
const COHERENT = 0.67;
const FINER = 4;
const MOST_HILLS = 400;
const LEAST_STRIDED = 256;

/** Grid maxima that could hide the highest peak between grid points: with twofold oversampling none below 1/√2 of the top can. */
function candidatesOf(values: Float64Array, share: number): number[] {
  const n = values.length;
  let top = -Infinity;
  for (let i = 0; i < n; i++) if (values[i]! > top) top = values[i]!;
  const least = top <= 0 ? top : share * top;
  const found: number[] = [];
  let before = values[n - 1]!;
  for (let i = 0; i < n; i++) {
    const v = values[i]!;
    if (v >= least && v >= before && v > values[i + 1 < n ? i + 1 : 0]!) found.push(i);
    before = v;
  }
  if (found.length === 0) found.push(values.indexOf(top));
  return found.sort((p, q) => values[q]! - values[p]! || p - q);
}

/**
 * The shift at which a cross spectrum is largest, over all shifts that its bins resolve.
 * Shape:  one peak; x in (−½, ½] cycles per bin, later > 0 for b.
 * Units:  value in the cross spectrum's own (before the factor 4 df).
 * Error:  the maximum itself to 1e-12 of its value (Newton); the cell is found by an inverse transform at least twice oversampled.
 * Fails:  never; an empty spectrum gives 0.
 * Source: engine design; without the refinement a match is low by up to 8e-5.
 */
export function findLag(c: CrossSpectrum, objective: Objective, stride: number): LagPeak {
  if (c.n === 0) return { x: 0, re: 0, im: 0, value: 0 };
  // Too few bins to leave any out: the lag is looked for on all of them.
  let step = c.n >= LEAST_STRIDED * stride ? stride : 1;
  const core = coreOf(c);
  const share = objective === 'real' ? 0.66 : 0.44;
  let grid = coarseGrid(c, core, objective, step);
  let hills = candidatesOf(grid, share);
  const top = grid[hills[0]!]!;
  // The inverse transform divides by its size.
  const height = (objective === 'real' ? top : Math.sqrt(Math.max(0, top))) * grid.length * step;
  const isIncoherent = height < COHERENT * core.total;
  if (isIncoherent || hills.length > MOST_CANDIDATES) {
    step = 1;
    grid = coarseGrid(c, { from: 0, to: c.n }, objective, step, FINER);
    hills = candidatesOf(grid, share).slice(0, MOST_HILLS);
  }
  const n = grid.length;
  let best: LagPeak | null = null;
  for (const i of hills) {
    const place = i + vertexBeside(grid[i > 0 ? i - 1 : n - 1]!, grid[i]!, grid[i + 1 < n ? i + 1 : 0]!);
    for (const start of shiftsOf(place, n, step)) {
      const peak = climb(c, start, 1 / (n * step), objective);
      if (best === null || peak.value > best.value) best = peak;
    }
  }
  return best ?? { x: 0, re: 0, im: 0, value: 0 };
}

/** The shift of the highest point of the core's grid and its height, for searches that climb later: hills of nearly one height are not told apart. */
export function roughLag(c: CrossSpectrum, objective: Objective, stride: number): { readonly x: number; readonly height: number } {
  if (c.n === 0) return { x: 0, height: 0 };
  const step = c.n >= LEAST_STRIDED * stride ? stride : 1;
  const grid = coarseGrid(c, coreOf(c), objective, step);
  let top = 0;
  for (let i = 1; i < grid.length; i++) if (grid[i]! > grid[top]!) top = i;
  const height = objective === 'real' ? grid[top]! : Math.sqrt(Math.max(0, grid[top]!));
  return { x: shiftsOf(top, grid.length, step)[0]!, height };
}

/** The top of the hill that a shift stands on. */
export const hillAt = (c: CrossSpectrum, x: number, objective: Objective): LagPeak => climb(c, x, 1 / powerOfTwoFrom(4 * (c.first + c.n)), objective);
