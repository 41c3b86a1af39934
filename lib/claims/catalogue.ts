import type { Quantity } from '@/lib/engine/contract/quantity';
import type { SettingRow } from '@/lib/engine/quantities/settings-table';

/**
 * The claim room turns a sheet, which anyone may have written, into claims whose every word is
 * known and in range, or into the list of everything that has to be mended. It computes nothing.
 * What can be claimed is handed in, so that the room knows the language and not the workshop.
 */
export interface Catalogue {
  readonly quantities: ReadonlyMap<string, Quantity>;
  readonly settings: ReadonlyMap<string, SettingRow>;
  /** Ids of the built-in noise curves. */
  readonly curves: readonly string[];
}

/** The whole catalogue of the format; those without a `Quantity` yet are refused by name. */
export const quantityIds = [
  'overlap', 'match', 'mismatch', 'fitting-factor', 'detectable-fraction', 'snr', 'snr-ratio', 'volume-ratio', 'horizon-distance', 'horizon-redshift',
  'distinguishability-snr', 'mode-content', 'radiated-energy', 'radiated-angular-momentum', 'recoil', 'peak-luminosity', 'remnant-mass', 'remnant-spin',
  'remnant-fit', 'ringdown-frequency', 'ringdown-damping', 'phase-difference', 'amplitude-difference', 'convergence-order', 'extrapolated-value',
  'radius-extrapolation', 'hybrid-snr', 'em-energy', 'em-ratio', 'field-exponent', 'em-frequency', 'degeneracy', 'em-mirroring', 'disc-luminosity',
  'cycles', 'eccentricity',
] as const;
