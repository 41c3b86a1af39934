import { powersOf } from './band-power';
import type { BinWeights } from './bin-weights';
import { SETTLED } from './prepare';
import type { Spectrum } from './spectrum';

export interface SweptSides {
  readonly spectra: readonly Spectrum[];
  /** Power of both polarisations by that of the response, of each. */
  readonly shares: readonly number[];
  /** What the spectra were multiplied by. */
  readonly scales: readonly [number, number];
}

/** Do these bins resolve the band's edges as well as a point alone asks for? */
export function edgesSettled(doubt: BinWeights['doubt'], { spectra, shares, scales }: SweptSides, norms: readonly [number, number]): boolean {
  return spectra.every((s, i) => {
    const { at } = powersOf(s);
    const moved = doubt.reduce((sum, { bin, weight }) => sum + weight * at[bin]!, 0);
    return !(Math.abs(moved) > (SETTLED * shares[i]! * norms[i]!) / scales[i]! ** 2);
  });
}
