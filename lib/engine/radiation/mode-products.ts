import type { Mode } from '../contract/waveform';
import { ratesInBlocks } from './flux-blocks';

/**
 * What the flux of a mode set is made of: products of neighbouring modes. A rate is
 * ℜ Σ (re + i·im)·X_a·Ḣ*_b, where X is Ḣ itself (energy, momentum) or H (angular momentum).
 */
export interface ModeProduct {
  /** Indices of modes. */
  readonly a: number;
  readonly b: number;
  readonly re: number;
  readonly im: number;
}

export type ModeIndexOf = (l: number, m: number) => number | null;

/**
 * Where a mode stands in a list.
 * Shape:  a function of (l, m).
 * Units:  none.
 * Error:  none.
 * Fails:  null for a mode that is not in the list.
 * Source: definition.
 */
export function indexOfModes(modes: readonly Pick<Mode, 'l' | 'm'>[]): ModeIndexOf {
  const places = new Map(modes.map(({ l, m }, i) => [`${l},${m}`, i]));
  return (l, m) => places.get(`${l},${m}`) ?? null;
}

/**
 * A rate at every sample.
 * Shape:  one number a sample of the modes.
 * Units:  those of the coefficients; the modes are dimensionless or r·h/M.
 * Error:  rounding.
 * Fails:  never.
 * Source: definition.
 */
export function rateOf(products: readonly ModeProduct[], left: readonly Pick<Mode, 're' | 'im'>[], right: readonly Pick<Mode, 're' | 'im'>[], samples: number): Float64Array {
  return ratesInBlocks([products], left, right, samples)[0]!;
}

/** Σ w·values. */
export function weightedSum(weights: Float64Array, values: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < values.length; i++) sum += weights[i]! * values[i]!;
  return sum;
}
