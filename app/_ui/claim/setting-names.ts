/** Settings in words: how each name of the sheet is labelled, in which unit, and how its value is printed. */
import { formatNumber, readable } from '../math/format-number';
import { unitText } from '../math/units';
import type { Place } from '@/lib/kernel/place';

interface SettingWords {
  readonly label: string;
  readonly unit?: string;
}

const words: Readonly<Record<string, SettingWords>> = {
  totalMassMsun: { label: 'Total mass', unit: 'Msun' },
  massFrame: { label: 'Mass frame' },
  redshift: { label: 'Redshift' },
  distanceMpc: { label: 'Distance', unit: 'Mpc' },
  fLowHz: { label: 'Lower cut-off', unit: 'Hz' },
  fHighHz: { label: 'Upper cut-off', unit: 'Hz' },
  maximise: { label: 'Maximised over' },
  inclinationRad: { label: 'Inclination', unit: 'rad' },
  azimuthRad: { label: 'Azimuth', unit: 'rad' },
  response: { label: 'Response' },
  modes: { label: 'Modes' },
  lMax: { label: 'Highest ℓ' },
  average: { label: 'Average' },
  detectors: { label: 'Detectors' },
  armAngleDeg: { label: 'Arm angle', unit: 'deg' },
  taper: { label: 'Taper' },
  threshold: { label: 'Threshold' },
  cosmology: { label: 'Cosmology' },
  startM: { label: 'Start of integrals', unit: 'M' },
  window: { label: 'Window', unit: 'M' },
  integrationFloor: { label: 'Integration floor', unit: 'rad/M' },
  alignment: { label: 'Alignment' },
  at: { label: 'Read at', unit: 'M' },
  includeEnergyBeforeStart: { label: 'Energy before the start' },
  normaliseBy: { label: 'Referred to' },
  parameters: { label: 'Parameters' },
  rateLaw: { label: 'Rate law' },
  templateMassRange: { label: 'Template mass range' },
  joinHz: { label: 'Join', unit: 'Hz' },
  amplitudeOrder: { label: 'Order of the amplitude' },
  formalOrder: { label: 'Formal order' },
  extrapolationOrder: { label: 'Degree in 1/r' },
  weight: { label: 'Weight' },
  statistic: { label: 'Statistic' },
  observable: { label: 'Observable' },
  method: { label: 'Method' },
  fit: { label: 'Fit' },
  fieldGauss: { label: 'Magnetic field', unit: 'G' },
  plasmaDensityCm3: { label: 'Plasma density', unit: 'cm^-3' },
  radiativeEfficiency: { label: 'Radiative efficiency' },
  accretionRateMsunPerYear: { label: 'Accretion rate', unit: 'Msun/yr' },
  internalEnergyErg: { label: 'Internal energy', unit: 'erg' },
  radiusM: { label: 'Radius', unit: 'M' },
  massRatio: { label: 'Mass ratio' },
  chi1z: { label: 'Spin χ₁' },
  chi2z: { label: 'Spin χ₂' },
  noise: { label: 'Noise curve' },
  negativeM: { label: 'Modes with m < 0' },
};

/** `somethingNewHz` → `Something new hz`: a name the table does not know is still readable. */
const fromName = (name: string) => name.replace(/([A-Z])/g, ' $1').toLowerCase().replace(/^./, (c) => c.toUpperCase());

export const settingLabel = (name: string): string => words[name]?.label ?? fromName(name);
export const settingUnit = (name: string): string => words[name]?.unit ?? '';

const modeText = ([l, m]: readonly number[]): string => `(${l},${m !== undefined && m < 0 ? `−${-m}` : m})`;

function listText(list: readonly unknown[]): string {
  if (list.length === 0) return 'nothing';
  const modes = list.filter((m): m is readonly number[] => Array.isArray(m) && m.length === 2);
  return modes.length === list.length ? modes.map(modeText).join(' ') : list.map(bare).join(', ');
}

function bare(value: unknown): string {
  if (value === null || value === undefined) return 'not given';
  if (typeof value === 'number') return readable(value);
  if (value === true) return 'yes';
  if (value === false) return 'no';
  if (typeof value === 'string') return value;
  if (Array.isArray(value)) return listText(value);
  return Object.entries(value).map(([key, part]) => `${key} ${bare(part)}`).join(', ');
}

/** The value with its unit, as text. */
export function formatSetting(name: string, value: unknown, unit?: string): string {
  const text = bare(value);
  const sign = unitText(unit ?? settingUnit(name));
  const numeric = typeof value === 'number' || (Array.isArray(value) && value.every((v) => typeof v === 'number'));
  return sign && numeric ? `${text} ${sign}` : text;
}

/** A sweep's point in words: `60 M⊙`. */
export const formatAt = (at: Place): string =>
  Object.entries(at).map(([name, value]) => (settingUnit(name) ? formatSetting(name, value) : `${settingLabel(name)} ${typeof value === 'number' ? formatNumber(value) : value}`)).join(', ');
