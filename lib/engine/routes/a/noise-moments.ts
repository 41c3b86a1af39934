import { chebyshevRule } from './chebyshev-rule';
import { logNear } from './log-near';
import type { NoiseWeigher } from './noise-weigher';

/** Steps of a rule over one piece of a row: a piece changes 1/S by e^½ at most and is this part of the range at most. */
const POINTS = 12;
const MOST_CHANGE = 0.5;
const WIDE = 1 / 4;
/** Rows mostly lie so close that each is a sixteenth of a range or less. */
const NARROW = 1 / 16;
const NARROW_POINTS = 8;

/** Adds ∫ T_m(x) / S df over [from, to] to `sums`; x runs from −1 to 1 over the range of the moments. */
function addPiece(sums: Float64Array, weigher: NoiseWeigher, row: number, from: number, to: number, low: number, perHz: number): void {
  const { points, weights } = chebyshevRule((to - from) * perHz < 2 * NARROW ? NARROW_POINTS : POINTS);
  const [middle, half] = [(from + to) / 2, (to - from) / 2];
  const logMiddle = Math.log(middle);
  for (let q = 0; q < points.length; q++) {
    const away = half * points[q]!;
    const w = half * weights[q]! * weigher.continuedAt(row, -1, logMiddle + logNear(away / middle));
    const x = (middle + away - low) * perHz - 1;
    let before = 1;
    let at = x;
    sums[0]! += w;
    sums[1]! += w * x;
    for (let m = 2; m < sums.length; m++) {
      const next = 2 * x * at - before;
      before = at;
      at = next;
      sums[m]! += w * next;
    }
  }
}

/**
 * What each Chebyshev node of a range of frequencies counts in ∫ g/S df, whatever the table's rows do between them.
 * Shape:  `order` weights; their sum is ∫ df/S.
 * Units:  those of 1/S, times Hz.
 * Error:  1e-15 for g a polynomial below the order; else W times how far g is from one at most, W = ∫ df/S.
 * Fails:  never; only a table's weigher is asked.
 * Source: ln S is linear in ln f between rows (settings.md rule 2.5); interpolation at Chebyshev nodes, integrated against 1/S.
 */
export function noiseMoments(weigher: NoiseWeigher, fromHz: number, toHz: number, order: number): Float64Array {
  const { kinksHz } = weigher;
  const sums = new Float64Array(order);
  const perHz = 2 / (toHz - fromHz);
  let i = weigher.firstKinkAbove(fromHz);
  for (let at = fromHz; at < toHz; i++) {
    const end = i < kinksHz.length ? Math.min(kinksHz[i]!, toHz) : toHz;
    const steepness = kinksHz.length > 0 ? weigher.steepnessAt(Math.min(i, kinksHz.length - 1)) : weigher.steepness(at, end);
    const change = (steepness * (end - at)) / at;
    const pieces = Math.max(1, Math.ceil(change / MOST_CHANGE), Math.ceil(((end - at) * perHz) / (2 * WIDE)));
    for (let p = 0; p < pieces; p++) addPiece(sums, weigher, i, at + ((end - at) * p) / pieces, at + ((end - at) * (p + 1)) / pieces, fromHz, perHz);
    at = end;
  }
  return atNodes(sums);
}

/** From ∫ T_m/S to the nodes' own weights: discrete orthogonality. */
function atNodes(sums: Float64Array): Float64Array {
  const order = sums.length;
  return chebyshevRule(order).points.map((x) => {
    const angle = Math.acos(x);
    let sum = sums[0]!;
    for (let m = 1; m < order; m++) sum += 2 * sums[m]! * Math.cos(m * angle);
    return sum / order;
  });
}
