/** Ids of quantities that the same reading moves, named once. The letters Q of the domain reference are one or two ids each. */
const pairs = ['overlap', 'match', 'mismatch', 'distinguishability-snr', 'fitting-factor', 'detectable-fraction', 'degeneracy'] as const;
const ratios = ['snr-ratio', 'volume-ratio'] as const;

/** Loudness itself, or a distance found from it. */
export const loudnesses = ['snr', 'horizon-distance', 'horizon-redshift', 'hybrid-snr'] as const;

/** A factor common to all loudness: it cancels in ratios and matches, not in a volume of an expanding universe. */
export const byLoudnessFactor = [...loudnesses, 'volume-ratio'] as const;

/** Every integral against a noise curve. */
export const banded = [...pairs, ...loudnesses, ...ratios, 'mode-content'] as const;

/** Numbers of waves that leave, from modes alone. */
export const fluxes = ['radiated-energy', 'radiated-angular-momentum', 'recoil', 'peak-luminosity'] as const;
export const remnants = ['remnant-mass', 'remnant-spin'] as const;
export const tones = ['ringdown-frequency', 'ringdown-damping'] as const;
export const differences = ['phase-difference', 'amplitude-difference'] as const;
/** What carries a number of the ones above to a limit. */
export const limits = ['extrapolated-value', 'radius-extrapolation'] as const;

/** Everything read off gravitational waves. */
export const gravitational = [...banded, ...fluxes, ...remnants, ...tones, 'cycles', 'eccentricity', ...differences, 'convergence-order', ...limits, 'em-ratio', 'em-frequency', 'em-mirroring'] as const;
