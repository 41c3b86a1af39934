import type { Band } from '../../contract/route';
import { gaussRule } from './gauss-legendre';

/** Quadrature nodes in frequency with 1/S already in the weights: ∫ g/S df ≈ Σ weight·g(f). */
export interface FrequencyNodes {
  readonly f: Float64Array;
  /** 1/Hz⁻¹: Gauss weight in Hz over S in 1/Hz. */
  readonly weight: Float64Array;
}

/** How wide a panel may be: half its phase range in rad, and its ratio of frequencies. */
const MOST_PHASE = 32;
const MOST_RATIO = 1.1;

const orders = new Map<number, number>();

/** Smallest Gauss order that integrates e^{icx} over [−1, 1] to `goal`: the next term is (c/2)^{2n}/(2n)!. */
function orderFor(c: number, goal: number): number {
  const key = Math.ceil(c * 64) / 64;
  const known = orders.get(key);
  if (known !== undefined && goal === DEFAULT_GOAL) return known;
  let term = 1;
  let n = 0;
  while (term > goal || 2 * n < key / 2) {
    n++;
    term *= (key / 2 / (2 * n - 1)) * (key / 2 / (2 * n));
  }
  const order = Math.max(2, n);
  if (goal === DEFAULT_GOAL) orders.set(key, order);
  return order;
}

export const DEFAULT_GOAL = 1e-15;

function kinksInside(points: Float64Array | null, low: number, high: number): number[] {
  if (points === null) return [];
  const inside: number[] = [];
  for (const f of points) if (f > low * (1 + 1e-12) && f < high * (1 - 1e-12)) inside.push(f);
  return inside;
}

function panelEdges(band: Band, high: number, lag: number): number[] {
  const stops = [band.fLowHz, ...kinksInside(band.noise.points, band.fLowHz, high), high];
  const widest = MOST_PHASE / (Math.PI * lag);
  const edges = [stops[0]!];
  for (let i = 1; i < stops.length; i++) {
    let from = stops[i - 1]!;
    const to = stops[i]!;
    while (true) {
      const width = Math.min(widest, from * (MOST_RATIO - 1));
      const pieces = Math.ceil((to - from) / width - 1e-9);
      if (pieces <= 1) break;
      from += Math.min(width, (to - from) / 2);
      edges.push(from);
    }
    edges.push(to);
  }
  return edges;
}

/** The curve may be asked a rounding beyond its ends, never more. */
const inside = (band: Band, f: number): number => Math.min(Math.max(f, band.noise.fLowHz), band.noise.fHighHz);

/**
 * Gauss–Legendre panels over [fLow, high] with edges at the band's ends and at every point of a
 * noise table, each with as many nodes as the record's length and the curve's slope ask for.
 * Shape:  ascending nodes; empty when the band is.
 * Units:  Hz; `lagS` is the longest lag in s to which the integrand oscillates.
 * Error:  `goal` of each panel's largest value, for integrands band-limited to ±lagS.
 * Fails:  never.
 * Source: Gauss quadrature of entire functions of exponential type; our derivation.
 */
export function frequencyNodes(band: Band, highHz: number, lagS: number, goal = DEFAULT_GOAL): FrequencyNodes {
  const f: number[] = [];
  const weight: number[] = [];
  if (!(highHz > band.fLowHz)) return { f: new Float64Array(0), weight: new Float64Array(0) };
  const edges = panelEdges(band, highHz, lagS);
  let before = band.noise.psd(inside(band, edges[0]!));
  for (let p = 1; p < edges.length; p++) {
    const [low, high] = [edges[p - 1]!, edges[p]!];
    const after = band.noise.psd(inside(band, high));
    const half = (high - low) / 2;
    const c = 2 * Math.PI * half * lagS + Math.abs(Math.log(after / before)) / 2;
    const rule = gaussRule(orderFor(c, goal));
    for (let i = 0; i < rule.x.length; i++) {
      const at = low + half * (1 + rule.x[i]!);
      f.push(at);
      weight.push((half * rule.w[i]!) / band.noise.psd(inside(band, at)));
    }
    before = after;
  }
  return { f: Float64Array.from(f), weight: Float64Array.from(weight) };
}
