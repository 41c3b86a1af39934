import type { Mode } from '@/lib/engine/contract/waveform';

/**
 * Largest sampled modulus of a complex series.
 * Shape:  re and im are parallel, or im is null for a real series; a scalar comes back.
 * Units:  those of the series.
 * Error:  of the samples, not of the curve between them: low by up to (ωΔt)²/8 of the peak.
 * Fails:  never; 0 for an empty series.
 * Source: definition.
 */
export function peakModulus(re: Float64Array, im: Float64Array | null): number {
  const n = re.length;
  let top = 0;
  if (im === null) {
    for (let i = 0; i < n; i++) {
      const size = Math.abs(re[i]!);
      if (size > top) top = size;
    }
    return top;
  }
  for (let i = 0; i < n; i++) {
    const x = re[i]!;
    const y = im[i]!;
    const size = x * x + y * y;
    if (size > top) top = size;
  }
  // Squares of physical strains (1e-22 and less) stay far above the smallest double; squares of 1e-160 would not.
  return top > 1e-280 ? Math.sqrt(top) : peakOfTiny(re, im);
}

function peakOfTiny(re: Float64Array, im: Float64Array): number {
  let top = 0;
  for (let i = 0; i < re.length; i++) top = Math.max(top, Math.hypot(re[i]!, im[i]!));
  return top;
}

/**
 * The mode with m > 0 and the largest peak; where there is none, the largest with m ≠ 0, else the largest.
 * Shape:  any non-empty list of modes on one axis.
 * Units:  those of the file.
 * Error:  peaks are read at samples.
 * Fails:  returns undefined for an empty list.
 * Source: rule 2.4.
 */
export function dominantMode(modes: readonly Mode[]): Mode | undefined {
  const pools = [modes.filter((mode) => mode.m > 0), modes.filter((mode) => mode.m !== 0), modes];
  const pool = pools.find((candidates) => candidates.length > 0) ?? [];
  if (pool.length === 1) return pool[0];
  let best: Mode | undefined;
  let top = -1;
  for (const mode of pool) {
    const peak = peakModulus(mode.re, mode.im);
    if (peak > top) [best, top] = [mode, peak];
  }
  return best;
}
