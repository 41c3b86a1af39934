import type { Area, FractionProblem } from './fraction-found';
import { spinDensity } from './spin-density';

/** A cubic between two knots: value, slope and halves of the second derivative in its own x − from. */
interface Segment {
  readonly from: number;
  readonly to: number;
  readonly c: readonly [number, number, number, number];
}

/**
 * Second derivatives of the spline whose third derivative does not jump at the second and the last but one knot.
 * Solved as one tridiagonal system in the inner knots, the outer two following from them.
 */
function bends(x: readonly number[], y: readonly number[]): number[] {
  const n = x.length;
  const h = x.slice(1).map((to, i) => to - x[i]!);
  const slope = h.map((step, i) => (y[i + 1]! - y[i]!) / step);
  const [lower, diagonal, upper, right]: [number[], number[], number[], number[]] = [[], [], [], []];
  for (let i = 1; i < n - 1; i++) {
    lower.push(h[i - 1]!);
    diagonal.push(2 * (h[i - 1]! + h[i]!));
    upper.push(h[i]!);
    right.push(6 * (slope[i]! - slope[i - 1]!));
  }
  // (M₁ − M₀)/h₀ = (M₂ − M₁)/h₁, and the same at the other end.
  const last = n - 3;
  const first = h[0]! / h[1]!;
  const final = h[n - 2]! / h[n - 3]!;
  diagonal[0]! += h[0]! * (1 + first);
  upper[0]! -= h[0]! * first;
  diagonal[last]! += h[n - 2]! * (1 + final);
  lower[last]! -= h[n - 2]! * final;
  for (let i = 1; i <= last; i++) {
    const part = lower[i]! / diagonal[i - 1]!;
    diagonal[i]! -= part * upper[i - 1]!;
    right[i]! -= part * right[i - 1]!;
  }
  const inner = new Array<number>(last + 1).fill(0);
  for (let i = last; i >= 0; i--) inner[i] = (right[i]! - (i < last ? upper[i]! * inner[i + 1]! : 0)) / diagonal[i]!;
  const [m1, m2] = [inner[0]!, inner[1]!];
  const [ml, mk] = [inner[last]!, inner[last - 1]!];
  return [m1 - first * (m2 - m1), ...inner, ml + final * (ml - mk)];
}

function segmentsOf(x: readonly number[], y: readonly number[]): Segment[] {
  const m = bends(x, y);
  return x.slice(1).map((to, i) => {
    const from = x[i]!;
    const h = to - from;
    const slope = (y[i + 1]! - y[i]!) / h - (h * (2 * m[i]! + m[i + 1]!)) / 6;
    return { from, to, c: [y[i]!, slope, m[i]! / 2, (m[i + 1]! - m[i]!) / (6 * h)] };
  });
}

const valueIn = ({ from, c }: Segment, x: number): number => c[0] + (x - from) * (c[1] + (x - from) * (c[2] + (x - from) * c[3]));

/** Where a cubic turns, inside its own segment. */
function turnsIn({ from, to, c }: Segment): number[] {
  const [, b, a2, a3] = c;
  const [p, q, r] = [3 * a3, 2 * a2, b];
  const root = Math.sqrt(Math.max(0, q * q - 4 * p * r));
  const s = -(q + (q >= 0 ? root : -root)) / 2;
  const found = q * q < 4 * p * r ? [] : [p === 0 ? Number.NaN : s / p, s === 0 ? Number.NaN : r / s];
  return found.map((u) => from + u).filter((x) => x > from && x < to);
}

function crossing(segment: Segment, low: number, high: number, level: number): number {
  let [a, b] = [low, high];
  const rising = valueIn(segment, high) > valueIn(segment, low);
  for (let round = 0; round < 80; round++) {
    const middle = (a + b) / 2;
    if (valueIn(segment, middle) > level === rising) b = middle;
    else a = middle;
  }
  return (a + b) / 2;
}

/** Crossings of a level, rising: each monotone part of each segment holds at most one. */
function crossings(segments: readonly Segment[], level: number): number[] {
  return segments.flatMap((segment) => {
    const parts = [segment.from, ...turnsIn(segment).sort((p, q) => p - q), segment.to];
    return parts.slice(1).flatMap((to, i) => {
      const from = parts[i]!;
      const [before, after] = [valueIn(segment, from) - level, valueIn(segment, to) - level];
      return before < 0 !== after < 0 ? [crossing(segment, from, to, level)] : [];
    });
  });
}

/** Six points are exact for the cube of a cubic times a straight line. */
const GAUSS = [
  [0.2386191860831969, 0.467913934572691],
  [0.6612093864662645, 0.3607615730481386],
  [0.932469514203152, 0.1713244923791704],
] as const;

const integral = (f: (x: number) => number, from: number, to: number): number => {
  const [middle, half] = [(from + to) / 2, (to - from) / 2];
  return half * GAUSS.reduce((sum, [x, w]) => sum + w * (f(middle - half * x) + f(middle + half * x)), 0);
};

const reader = (segments: readonly Segment[]) => (x: number): number => valueIn(segments.find(({ to }) => x <= to) ?? segments[segments.length - 1]!, x);

/** The not-a-knot cubic spline through points, for drawing. */
export const splineBySegments = (x: readonly number[], y: readonly number[]): ((at: number) => number) => reader(segmentsOf(x, y));

/**
 * The part of the weight where the not-a-knot spline through the matches is at or above the threshold.
 * Shape:  at least five spins, rising.
 * Units:  a fraction; regions in spin.
 * Error:  rounding: crossings by bisection on monotone parts, areas by Gauss rules that are exact on every part.
 * Fails:  never; NaN among the matches gives NaN.
 * Source: settings.md section 3.
 */
export function areaBySegments({ spins, matches, rhos, threshold, measure }: FractionProblem): Area {
  const [low, high] = [spins[0]!, spins[spins.length - 1]!];
  const curve = segmentsOf(spins, matches);
  const match = reader(curve);
  const loudness = measure.volume ? reader(segmentsOf(spins, rhos)) : null;
  const density = spinDensity(measure, low, high);
  const weight = (x: number): number => density.at(x) * (loudness === null ? 1 : loudness(x) ** 3);
  const edges = [low, ...crossings(curve, threshold), high].sort((p, q) => p - q);
  const stops = [...new Set([...edges, ...spins, ...density.kinks])].sort((p, q) => p - q);
  let [all, above] = [0, 0];
  const regions: [number, number][] = [];
  for (let i = 1; i < stops.length; i++) {
    const [from, to] = [stops[i - 1]!, stops[i]!];
    const part = integral(weight, from, to);
    all += part;
    if (!(match((from + to) / 2) >= threshold)) continue;
    above += part;
    const before = regions[regions.length - 1];
    if (before?.[1] === from) before[1] = to;
    else regions.push([from, to]);
  }
  return { fraction: matches.every(Number.isFinite) ? above / all : Number.NaN, regions };
}
