import type { MaximiseOver, Response } from '@/lib/engine/contract/settings';
import type { BinWeights } from './bin-weights';
import { channelsOf, crossSpectrum, type Channel } from './cross-spectrum';
import { evaluateAt, findLag, hillAt, type LagPeak, type Objective } from './lag-search';
import type { Spectrum } from './spectrum';

/** How b may be moved against a once its own shape is fixed. */
export interface Freedom {
  readonly response: Response;
  /** Is the shift free? If not, the files' own times hold. */
  readonly time: boolean;
  /** Is a constant phase (real response) or rotation (both polarisations) free? */
  readonly turn: boolean;
}

export interface Alignment {
  /** ⟨a|b⟩/(‖a‖‖b‖) after the move; NaN when one of them has no power in the band. */
  readonly value: number;
  /** Shift of b against a between the spectra's reference times, in cycles per bin. */
  readonly x: number;
  /** Phase of the cross spectrum there, taken out when `turn` is free. */
  readonly turnRad: number;
  /** ‖a‖² and ‖b‖² without 4 df (real response) or 2 df (both polarisations). */
  readonly norms: readonly [number, number];
}

/** With real responses a free phase is the modulus; with both polarisations so is a free rotation. */
export function freedomOf(response: Response, maximise: readonly MaximiseOver[], bHasModes: boolean): Freedom {
  const has = (what: MaximiseOver): boolean => maximise.includes(what);
  const turn = response === 'complex' ? has('polarisation') || (has('phase') && !bHasModes) : has('phase');
  return { response, time: has('time'), turn };
}

/** Where x stands when neither file is moved. */
const unmovedX = (a: Spectrum, b: Spectrum, secondsPerUnit: readonly number[], dfHz: number): number =>
  (b.referenceTime * secondsPerUnit[1]! - a.referenceTime * secondsPerUnit[0]!) * dfHz;

export interface Pair {
  readonly a: Spectrum;
  readonly b: Spectrum;
  readonly weights: BinWeights;
  readonly lagStride: number;
  readonly secondsPerUnit: readonly number[];
}

/**
 * The largest normalised product of a and b under the given freedom.
 * Shape:  two spectra on common bins; the hill at `nearShiftS` where one is named, else the highest.
 * Units:  dimensionless.
 * Error:  see `findLag`.
 * Fails:  value NaN when either norm is not positive.
 * Source: settings.md rule 2.7.
 */
export function align(pair: Pair, freedom: Freedom, nearShiftS?: number): Alignment {
  const { a, b, weights } = pair;
  const c = crossSpectrum(a, b, freedom.response, weights);
  const objective: Objective = freedom.turn ? 'modulus' : 'real';
  const free = (): LagPeak => (nearShiftS === undefined ? findLag(c, objective, pair.lagStride) : hillAt(c, xOfShift(pair, nearShiftS), objective));
  const peak = freedom.time ? free() : unmoved(pair, c, objective);
  const value = c.normA > 0 && c.normB > 0 ? peak.value / Math.sqrt(c.normA * c.normB) : Number.NaN;
  return { value, x: peak.x, turnRad: freedom.turn ? Math.atan2(peak.im, peak.re) : 0, norms: [c.normA, c.normB] };
}

function unmoved(pair: Pair, c: Parameters<typeof evaluateAt>[0], objective: Objective): LagPeak {
  const x = unmovedX(pair.a, pair.b, pair.secondsPerUnit, pair.weights.dfHz);
  const { re, im } = evaluateAt(c, x);
  return { x, re, im, value: objective === 'real' ? re : Math.hypot(re, im) };
}

/** Seconds by which b is moved, later > 0. */
export function shiftS(pair: Pair, x: number): number {
  return x / pair.weights.dfHz - unmovedX(pair.a, pair.b, pair.secondsPerUnit, pair.weights.dfHz) / pair.weights.dfHz;
}

/** The inverse of `shiftS`. */
export const xOfShift = (pair: Pair, timeShiftS: number): number =>
  timeShiftS * pair.weights.dfHz + unmovedX(pair.a, pair.b, pair.secondsPerUnit, pair.weights.dfHz);

/** Σ V |s_a a − s_b b e^{−2πikx} e^{iφ}|² over one channel. */
function residual(a: Channel, b: Channel, weights: BinWeights, scales: readonly [number, number], x: number, turnRad: number): number {
  const { first, values } = weights;
  const { re: aRe, im: aIm } = a;
  const { re: bRe, im: bIm } = b;
  const [sa, sb] = scales;
  let sum = 0;
  let c = 0;
  let s = 0;
  const stepC = Math.cos(2 * Math.PI * x);
  const stepS = -Math.sin(2 * Math.PI * x);
  for (let j = 0; j < values.length; j++) {
    const k = first + j;
    if (j % 256 === 0) {
      const turns = k * x - Math.round(k * x);
      c = Math.cos(turnRad - 2 * Math.PI * turns);
      s = Math.sin(turnRad - 2 * Math.PI * turns);
    }
    const dRe = sa * aRe[k]! - sb * (bRe[k]! * c - bIm[k]! * s);
    const dIm = sa * aIm[k]! - sb * (bRe[k]! * s + bIm[k]! * c);
    sum += values[j]! * (dRe * dRe + dIm * dIm);
    const next = c * stepC - s * stepS;
    s = c * stepS + s * stepC;
    c = next;
  }
  return sum;
}

/**
 * Weighted power of the difference of a and the moved b, without cancellation.
 * Shape:  the scales multiply a and b (1/‖·‖ for a mismatch, strain factors for actual amplitudes).
 * Units:  Σ V|·|²; multiply by 4 df (real response) or 2 df (both polarisations).
 * Error:  relative 1e-15 of the sum itself, however small it is.
 * Fails:  never.
 * Source: 1 − ⟨â|b̂⟩ = ½‖â − b̂‖².
 */
export function residualSum(pair: Pair, response: Response, scales: readonly [number, number], x: number, turnRad: number): number {
  const [ca, cb] = [channelsOf(pair.a, response), channelsOf(pair.b, response)];
  const plus = residual(ca.plus, cb.plus, pair.weights, scales, x, turnRad);
  if (ca.minus === null || cb.minus === null) return plus;
  // A rotation by φ multiplies Y = Z(−f)* by e^{−iφ}; the shift multiplies both alike.
  return plus + residual(ca.minus, cb.minus, pair.weights, scales, x, -turnRad);
}
