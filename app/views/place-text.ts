import type { Place } from '@/lib/kernel/place';

const names: Readonly<Record<string, readonly [words: string, unit: string]>> = {
  totalMassMsun: ['', 'M⊙'],
  distanceMpc: ['at', 'Mpc'],
  fLowHz: ['from', 'Hz'],
  fHighHz: ['up to', 'Hz'],
  redshift: ['redshift', ''],
  inclinationRad: ['inclination', 'rad'],
  azimuthRad: ['azimuth', 'rad'],
};

/** Where on a sweep: `60 M⊙`, `from 20 Hz`; null for a single value. */
export function placeText(at: Place): string | null {
  const parts = Object.entries(at).map(([name, value]) => {
    const [words, unit] = names[name] ?? [name, ''];
    return [words, String(value).replace('-', '−'), unit].filter(Boolean).join(' ');
  });
  return parts.length === 0 ? null : parts.join(', ');
}
