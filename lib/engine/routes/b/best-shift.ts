import type { Channel } from './channels';
import { correlate, significantNodes, type Product, type ShiftGrid } from './correlation-scan';

/** How a correlation is read: its modulus when a free turn of b is allowed, else its real part. */
export type Reading = 'modulus' | 'real';

export interface ShiftedPeak {
  readonly shiftS: number;
  readonly value: number;
  /** The turn of b that attains it; 0 when none is free. */
  readonly turnRad: number;
}

const MOST_SHIFTS = 1 << 20;
/** Hills whose interpolated top is lower than this share of the highest cannot hide the maximum: eight samples a cycle leave 0.3 %. */
const CANDIDATE = 0.98;
const MOST_CANDIDATES = 12;

/** q = prefactor·weight·a·b*, channel by channel. */
export function productsOf(a: readonly Channel[], b: readonly Channel[], weight: Float64Array): Product[] {
  return a.map((p, c) => {
    const q = b[c]!;
    const re = new Float64Array(weight.length);
    const im = new Float64Array(weight.length);
    for (let i = 0; i < weight.length; i++) {
      const w = p.prefactor * weight[i]!;
      re[i] = w * (p.re[i]! * q.re[i]! + p.im[i]! * q.im[i]!);
      im[i] = w * (p.im[i]! * q.re[i]! - p.re[i]! * q.im[i]!);
    }
    return { turn: p.turn, re, im };
  });
}

interface Jet {
  readonly z: readonly [number, number];
  readonly first: readonly [number, number];
  readonly second: readonly [number, number];
}

/** Z and its first two derivatives at one shift, by plain sums over every node. */
function jetAt(products: readonly Product[], f: Float64Array, shiftS: number): Jet {
  let [zr, zi, dr, di, er, ei] = [0, 0, 0, 0, 0, 0];
  for (const { turn, re, im } of products) {
    for (let i = 0; i < f.length; i++) {
      const omega = 2 * Math.PI * f[i]!;
      const c = Math.cos(omega * shiftS);
      const s = Math.sin(omega * shiftS);
      const a = re[i]! * c - im[i]! * s;
      const b = re[i]! * s + im[i]! * c;
      zr += a;
      zi += turn * b;
      dr -= omega * b;
      di += turn * omega * a;
      er -= omega * omega * a;
      ei -= turn * omega * omega * b;
    }
  }
  return { z: [zr, zi], first: [dr, di], second: [er, ei] };
}

/** The function to be maximised (|Z|² or Re Z) with slope and curvature. */
function read(jet: Jet, reading: Reading): readonly [value: number, slope: number, curvature: number] {
  const [z, d, e] = [jet.z, jet.first, jet.second];
  if (reading === 'real') return [z[0], d[0], e[0]];
  return [
    z[0] * z[0] + z[1] * z[1],
    2 * (d[0] * z[0] + d[1] * z[1]),
    2 * (d[0] * d[0] + d[1] * d[1] + e[0] * z[0] + e[1] * z[1]),
  ];
}

/** Newton on the slope inside ±reach of the start; where the hill is not yet concave, a third of the way uphill. */
function climb(products: readonly Product[], f: Float64Array, start: number, reach: number, reading: Reading): number {
  let [low, high] = [start - reach, start + reach];
  let shift = start;
  for (let pass = 0; pass < 60; pass++) {
    const [, slope, curvature] = read(jetAt(products, f, shift), reading);
    if (slope === 0) break;
    if (slope > 0) low = shift;
    else high = shift;
    let next = curvature < 0 ? shift - slope / curvature : NaN;
    if (!(next > low && next < high)) next = slope > 0 ? shift + (high - shift) / 3 : shift - (shift - low) / 3;
    const moved = Math.abs(next - shift);
    shift = next;
    if (moved <= 1e-11 * reach) break;
  }
  return shift;
}

export function readAt(products: readonly Product[], f: Float64Array, shiftS: number, reading: Reading): ShiftedPeak {
  const { z } = jetAt(products, f, shiftS);
  if (reading === 'real') return { shiftS, value: z[0], turnRad: 0 };
  return { shiftS, value: Math.hypot(z[0], z[1]), turnRad: Math.atan2(z[1], z[0]) };
}

/** Fine enough that a hill of the widest spectrum in use loses less than a tenth between two shifts. */
function scanGrid(products: readonly Product[], f: Float64Array, reachS: number, reading: Reading): ShiftGrid {
  const kept = significantNodes(products);
  const low = f[kept[0] ?? 0] ?? 0;
  const high = f[kept[kept.length - 1] ?? 0] ?? 0;
  const twoSided = reading === 'real' || products.length > 1;
  const fastest = twoSided ? 2 * high : Math.max(high - low, 1e-3 * high);
  const step = Math.max(1 / (4 * fastest), (2 * reachS) / MOST_SHIFTS);
  const half = Math.ceil(reachS / step);
  return { first: -half * step, step, n: 2 * half + 1 };
}

/** Samples above both neighbours whose parabola reaches close to the highest one, highest first. */
function hillsOf(height: Float64Array): number[] {
  const n = height.length;
  const at = (i: number): number => (i < 0 || i >= n ? -Infinity : height[i]!);
  const tops: { i: number; top: number }[] = [];
  for (let i = 0; i < n; i++) {
    const [before, here, after] = [at(i - 1), at(i), at(i + 1)];
    if (!(here >= before && here > after)) continue;
    const bend = before - 2 * here + after;
    tops.push({ i, top: Number.isFinite(bend) && bend < 0 ? here - (after - before) ** 2 / (8 * bend) : here });
  }
  tops.sort((p, q) => q.top - p.top || p.i - q.i);
  const highest = tops[0]?.top ?? 0;
  const floor = highest > 0 ? CANDIDATE * highest : highest / CANDIDATE;
  return tops.filter(({ top }) => top >= floor).slice(0, MOST_CANDIDATES).map(({ i }) => i);
}

/** The top of the hill that `near` stands on, for searches that move b's pose a little. */
export function nearbyShift(products: readonly Product[], f: Float64Array, near: number, reading: Reading): ShiftedPeak {
  const { step } = scanGrid(products, f, 0, reading);
  return readAt(products, f, climb(products, f, near, 2 * step, reading), reading);
}

/**
 * The shift of b that brings it closest to a, from everywhere their records can overlap.
 * Shape:  products on the nodes f; reachS half the sum of the records' lengths.
 * Units:  s; the value as the products.
 * Error:  slope zero to rounding: 1e-15 of the value.
 * Fails:  never; a product that vanishes gives shift 0.
 * Source: settings.md rule 2.7; our derivation.
 */
export function bestShift(products: readonly Product[], f: Float64Array, reachS: number, reading: Reading): ShiftedPeak {
  const grid = scanGrid(products, f, reachS, reading);
  const z = correlate(products, f, grid);
  const height = z.re.map((x, i) => (reading === 'real' ? x : Math.hypot(x, z.im[i]!)));
  let best: ShiftedPeak | null = null;
  for (const i of hillsOf(height)) {
    const shift = climb(products, f, grid.first + i * grid.step, 2 * grid.step, reading);
    const peak = readAt(products, f, shift, reading);
    if (best === null || peak.value > best.value) best = peak;
  }
  return best ?? readAt(products, f, 0, reading);
}
