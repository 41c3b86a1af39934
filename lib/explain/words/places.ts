import type { Place, SweptValue } from '@/lib/kernel/place';
import { listOf, plainNumber } from './numbers';

/** How a swept setting is said, and its unit. */
const said: Readonly<Record<string, readonly [name: string, unit: string]>> = {
  totalMassMsun: ['a total mass of', 'M☉'],
  distanceMpc: ['a distance of', 'Mpc'],
  redshift: ['a redshift of', ''],
  fLowHz: ['a lower cut-off of', 'Hz'],
  fHighHz: ['an upper cut-off of', 'Hz'],
  inclinationRad: ['an inclination of', 'rad'],
  azimuthRad: ['an azimuth of', 'rad'],
  taper: ['a taper of', ''],
  startM: ['a start at', 'M'],
  integrationFloor: ['an integration floor of', 'rad/M'],
  lMax: ['modes up to ℓ =', ''],
  threshold: ['a threshold of', ''],
  fieldGauss: ['a field of', 'G'],
};

export function placeOf(setting: string, value: SweptValue, unit?: string): string {
  const [name, own] = said[setting] ?? [`${setting} =`, ''];
  return [name, typeof value === 'number' ? plainNumber(value) : `“${value}”`, unit ?? own].filter((part) => part !== '').join(' ');
}

/** `at a total mass of 60 M☉`; empty for a single number. */
export const atPlace = (at: Place): string => {
  const places = Object.entries(at).map(([setting, value]) => placeOf(setting, value));
  return places.length === 0 ? '' : ` at ${listOf(places)}`;
};
