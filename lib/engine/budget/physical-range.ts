import type { PhysicalRange } from './monte-carlo';

const open: PhysicalRange = { low: null, high: null };
const share: PhysicalRange = { low: 0, high: 1 };
const positive: PhysicalRange = { low: 0, high: null };

/** Quantities that cannot lie anywhere: products of unit vectors, fractions, sizes, spins. */
const ranges: ReadonlyMap<string, PhysicalRange> = new Map([
  ['overlap', { low: -1, high: 1 }],
  ...['match', 'mismatch', 'fitting-factor', 'detectable-fraction', 'degeneracy', 'mode-content', 'radiated-energy', 'remnant-mass'].map((id) => [id, share] as const),
  ['remnant-spin', { low: -1, high: 1 }],
  ...['snr', 'snr-ratio', 'volume-ratio', 'horizon-distance', 'horizon-redshift', 'hybrid-snr', 'distinguishability-snr', 'recoil', 'peak-luminosity', 'ringdown-frequency', 'convergence-order', 'cycles', 'eccentricity', 'em-energy', 'em-ratio', 'em-frequency', 'em-mirroring', 'disc-luminosity'].map((id) => [id, positive] as const),
]);

/** Where a quantity can lie at all, in its own unit. */
export const physicalRange = (quantityId: string): PhysicalRange => ranges.get(quantityId) ?? open;
