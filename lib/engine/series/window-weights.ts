import type { TaperWindow } from '@/lib/engine/contract/route';
import { taperWeightAt } from '@/lib/engine/conditioning/taper-window';
import { edgeRule } from './edge-weights';
import type { UniformGrid } from './local-interpolation';

/** sin² of a ramp continued past its ends as a formula: what lies on the other side of a kink. */
const continued = (fraction: number): number => {
  const s = Math.sin((Math.PI / 2) * fraction);
  return s * s;
};

/** Adds, around a kink at t, the end weights times the jump from the formula on its left to that on its right. */
function correctKink(weights: Float64Array, grid: UniformGrid, t: number, order: number, jump: (at: number) => number): void {
  const place = (t - grid.t0) / grid.dt;
  const inside = Math.ceil(place);
  if (inside < 1 || inside > grid.n - 1 || grid.n < order) return;
  const from = Math.max(0, Math.min(inside - (order >> 1), grid.n - order));
  const share = new Float64Array(order);
  edgeRule(order, from - inside).weightsAt(inside - place, share);
  for (let j = 0; j < order; j++) weights[from + j]! += share[j]! * jump(grid.t0 + (from + j) * grid.dt);
}

/** The taper of every sample, asked for on the ramps only. */
function taperOn({ n, t0, dt }: UniformGrid, window: TaperWindow): Float64Array {
  const weights = new Float64Array(n).fill(1);
  const taperAt = (k: number): number => taperWeightAt(window, t0 + k * dt);
  const { start, end } = window;
  if (start !== null) for (let k = 0; k < n && t0 + k * dt < start.to; k++) weights[k] = taperAt(k);
  if (end !== null) for (let k = n - 1; k >= 0 && t0 + k * dt > end.from; k--) weights[k] = taperAt(k);
  return weights;
}

/** The first and the last `order` samples, which are not the same ones. */
function correctEnds(weights: Float64Array, grid: UniformGrid, tEnd: number, order: number): void {
  const share = new Float64Array(order);
  edgeRule(order, 0).weightsAt(0, share);
  for (let j = 0; j < order; j++) weights[j]! += share[j]! * weights[j]!;
  const last = grid.n - 1;
  const beyond = Math.max(0, (tEnd - grid.t0) / grid.dt - last);
  edgeRule(order, 0).weightsAt(beyond, share);
  for (let j = 0; j < order; j++) weights[last - j]! += share[j]! * weights[last - j]!;
}

/**
 * Taper and quadrature in one: ∫ h(t) w(t) g(t) dt over the whole record = dt Σ weight_k h_k g_k.
 * Shape:  one weight a grid sample; the record runs from grid.t0 to tEnd, which may lie past the last sample by less than a step.
 * Units:  dimensionless; multiply by dt.
 * Error:  order `order` at the record's ends and at the ends of the ramps, spectral between them.
 * Fails:  never; grids shorter than the order lower it.
 * Source: settings.md rule 2.4 for the taper; end weights as in `edge-weights`.
 */
export function windowWeights(grid: UniformGrid, tEnd: number, window: TaperWindow, wantedOrder: number): Float64Array {
  const order = Math.max(1, Math.min(wantedOrder, grid.n >> 1));
  const weights = taperOn(grid, window);
  correctEnds(weights, grid, tEnd, order);
  const { start, end } = window;
  const rise = (t: number): number => (start === null ? 1 : continued((t - start.from) / (start.to - start.from)));
  const fall = (t: number): number => (end === null ? 1 : continued((end.to - t) / (end.to - end.from)));
  if (start !== null) correctKink(weights, grid, start.to, order, (t) => (1 - rise(t)) * (end !== null && t > end.from ? fall(t) : 1));
  if (end !== null) correctKink(weights, grid, end.from, order, (t) => (fall(t) - 1) * (start !== null && t < start.to ? rise(t) : 1));
  return weights;
}
