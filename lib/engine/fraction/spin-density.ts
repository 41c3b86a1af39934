import type { SpinMeasure } from './fraction-found';

export interface SpinDensity {
  /** Not normalised: only ratios of areas are taken. */
  readonly at: (spin: number) => number;
  /** Where its formula changes, between the ends. */
  readonly kinks: readonly number[];
}

/**
 * How densely effective spins lie between two ends.
 * Shape:  zero outside; a trapezium for unequal masses, a triangle for equal ones.
 * Units:  any.
 * Error:  none: a closed form.
 * Fails:  never.
 * Source: (m₁χ₁ + m₂χ₂)/M for χ₁ and χ₂ uniform and independent: the convolution of two uniform densities.
 */
export function spinDensity({ kind, m1, m2 }: SpinMeasure, low: number, high: number): SpinDensity {
  if (kind === 'diagonal') return { at: () => 1, kinks: [] };
  const rise = Math.min(m1, m2) * (high - low);
  const top = rise > 0 ? rise : 1;
  return {
    at: (spin) => Math.max(0, Math.min(1, (spin - low) / top, (high - spin) / top)),
    kinks: [...new Set([low + rise, high - rise])].filter((x) => x > low && x < high),
  };
}
