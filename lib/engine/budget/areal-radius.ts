import type { Waveform } from '../contract/waveform';

/**
 * The extraction radius as an areal one.
 * Shape:  one number; null where the sheet gives none.
 * Units:  M.
 * Error:  a coordinate radius is taken as it stands.
 * Fails:  never.
 * Source: settings.md section 6: isotropic r(1 + 1/2r)².
 */
export function areal({ extractionRadiusM: r, radiusType = 'areal' }: Waveform): number | null {
  if (r === undefined) return null;
  return radiusType === 'isotropic' ? r * (1 + 1 / (2 * r)) ** 2 : r;
}
