import { houseCosmology } from '../units/cosmology';
import type { DeclaredSettings } from './settings';

/**
 * What stands for a setting that is not declared, wherever that is one value for every claim. The
 * engine computes with these and the settings table prints them: a default has no second spelling.
 * Defaults that are read from the files (a band's edges, a start) have no row here.
 */
export const houseValues = {
  maximise: ['time', 'phase'],
  inclinationRad: 0,
  azimuthRad: 0,
  response: 'plus',
  modes: 'all',
  average: 'optimal',
  detectors: 1,
  armAngleDeg: 90,
  taper: 'auto',
  threshold: 8,
  cosmology: houseCosmology,
  includeEnergyBeforeStart: false,
  normaliseBy: 'M',
  alignment: 'window',
  at: 'peak',
  parameters: 1,
  rateLaw: 'euclidean',
  templateMassRange: [0.5, 2],
  amplitudeOrder: 1,
  extrapolationOrder: 2,
  weight: 'plane',
  statistic: 'minimum',
  fit: 'mean',
  plasmaDensityCm3: 0.03,
} as const satisfies DeclaredSettings;

/** From the peak, in M: where a ringdown is fitted unless `window` says otherwise. `window` has another default for each quantity. */
export const ringdownWindow = [25, 60] as const;

/** From ψ₄'s peak, in M: where two waves are compared unless `window` says otherwise. */
export const mirroringWindow = [-100, 40] as const;

/** The match at which a signal counts as seen, unless `threshold` says otherwise. */
export const houseMatchThreshold = 0.965;

/** What an order is measured in, and what is carried to a limit, unless `observable` says otherwise. */
export const houseOrderObservable = 'dominant';
export const houseLimitObservable = 'radiated-energy';

/** The mass to which a recoil is referred unless `normaliseBy` says otherwise. */
export const houseRecoilMass = 'remnant';
