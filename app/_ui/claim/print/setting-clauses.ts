import type { UsedSetting } from '@/lib/engine/contract/measurement';
import type { ResultClaim, ResultPoint } from '@/lib/pipeline/result';
import { formatSetting, settingLabel } from '../setting-names';

/** Columns of the table row; the sentence takes the clauses in this order. */
export type ClausePlace = 'band' | 'maximised' | 'mass' | 'modes' | 'other';

export interface Clause {
  readonly place: ClausePlace;
  readonly text: string;
}

const loose = (value: unknown): Readonly<Record<string, unknown>> | null => (typeof value === 'object' && value !== null && !Array.isArray(value) ? (value as Readonly<Record<string, unknown>>) : null);

/** A value that was another one at each point, as the run kept it: its ends. */
const isRange = (value: unknown): value is { readonly from: number; readonly to: number } => {
  const parts = loose(value);
  return parts !== null && typeof parts['from'] === 'number' && typeof parts['to'] === 'number';
};

/** What one point took: the swept value, else the point's own, else the claim's. */
export const valueAt = (setting: UsedSetting, point: ResultPoint): unknown => point.at[setting.name] ?? point.settings?.[setting.name] ?? setting.value;

const printed = ({ name, unit }: UsedSetting, value: unknown): string =>
  isRange(value) ? `between ${formatSetting(name, value.from, unit)} and ${formatSetting(name, value.to, unit)} over the points of this claim` : formatSetting(name, value, unit);

const list = (items: readonly string[]): string => (items.length < 2 ? (items[0] ?? '') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`);

const maximisedOver: Readonly<Record<string, string>> = { templateMass: 'template mass' };
const maximisedText = (value: unknown): string =>
  !Array.isArray(value) ? 'maximised over what is unknown' : value.length === 0 ? 'not maximised' : `maximised over ${list(value.map((v) => maximisedOver[String(v)] ?? String(v)))}`;

/** `all` leaves out m = 0 in a detector, and nothing where energy is summed (settings.md 2.3). */
const modesText = (value: unknown, inDetector: boolean): string =>
  value === 'all' ? (inDetector ? 'all modes of the files with m ≠ 0' : 'all modes of the files') : `modes ${formatSetting('modes', value)}`;

const averages: Readonly<Record<string, string>> = { optimal: 'no average over directions', sky: 'averaged over the sky', 'sky-orientation': 'averaged over sky and orientation', volume: 'averaged over volume' };
const before: Readonly<Record<string, string>> = { false: 'energy before the start left out', true: 'energy since infinite separation added', removed: 'energy between the first sample and the start added' };
const references: Readonly<Record<string, string>> = { M: 'referred to the total mass M', adm: 'referred to the ADM energy', remnant: 'referred to the remnant mass' };

function responseText(value: unknown): string {
  const factors = loose(value);
  return factors ? `response F₊ = ${formatSetting('', factors['plus'])}, F× = ${formatSetting('', factors['cross'])}` : `response ${formatSetting('response', value)}`;
}

function cosmologyText(value: unknown): string {
  const parts = loose(value);
  return parts ? `flat cosmology with H₀ = ${formatSetting('', parts['h0'])} km/s/Mpc and Ωₘ = ${formatSetting('', parts['omegaM'])}` : `cosmology ${formatSetting('', value)}`;
}

function taperText(value: unknown): string {
  if (value === 'auto') return 'house taper';
  return value === 'none' ? 'no taper' : `house taper with ramps × ${formatSetting('', value)}`;
}

/** Where two records are laid over each other, and where what is left is read. */
function alignedText(value: unknown): string {
  const parts = loose(value);
  if (parts) return `aligned where both reach ${formatSetting('', parts['frequencyM'])} rad/M`;
  return value === 'none' ? 'not aligned' : value === 'peak' ? 'aligned at the peaks' : 'aligned over the window';
}

const readings: Readonly<Record<string, string>> = { peak: 'read at the peak', end: 'read at the end of the common interval', window: 'read as the mean over the window', maximum: 'read where it is largest up to the peak' };

function readText(value: unknown): string {
  if (typeof value === 'number') return `read at t = ${formatSetting('', value)} M`;
  const parts = loose(value);
  if (parts && 'frequencyM' in parts) return `read where the first reaches ${formatSetting('', parts['frequencyM'])} rad/M`;
  return parts ? `read at t = ${formatSetting('', parts['timeM'])} M` : (readings[String(value)] ?? `read at ${String(value)}`);
}

/** Names whose value alone, or label and value alone, would be misread in running text. */
const special: Readonly<Record<string, (value: unknown, setting: UsedSetting, inDetector: boolean) => string>> = {
  maximise: maximisedText,
  modes: (value, _setting, inDetector) => modesText(value, inDetector),
  lMax: (value) => `ℓ ≤ ${formatSetting('', value)}`,
  average: (value) => averages[String(value)] ?? `average ${String(value)}`,
  detectors: (value) => (value === 1 ? '1 detector' : `${formatSetting('', value)} equal detectors in one place`),
  response: responseText,
  taper: taperText,
  cosmology: cosmologyText,
  alignment: alignedText,
  at: readText,
  rateLaw: (value) => `${formatSetting('', value)} rate law`,
  parameters: (value) => `${formatSetting('', value)} ${value === 1 ? 'parameter' : 'parameters'}`,
  includeEnergyBeforeStart: (value) => before[String(value)] ?? `energy before the start: ${String(value)}`,
  normaliseBy: (value) => references[String(value)] ?? `referred to ${String(value)}`,
  startM: (value, setting) => `integrated from t = ${printed(setting, value)}`,
  negativeM: (value) => (value === 'mirror' ? 'modes with m < 0 by reflection' : `modes with m < 0: ${formatSetting('', value)}`),
  templateMassRange: (value) => (Array.isArray(value) ? `template mass from ${formatSetting('', value[0])} to ${formatSetting('', value[1])} times the mass` : `template mass range ${formatSetting('', value)}`),
};

const placeOf: Readonly<Record<string, ClausePlace>> = { maximise: 'maximised', modes: 'modes', lMax: 'modes', negativeM: 'modes', redshift: 'mass' };

/** Swept and declared settings stand as they are; a house default is called what it is. */
const marked = (text: string, setting: UsedSetting): string => (setting.standing === 'assumed' ? `${text} (assumed)` : text);

const lowered = (label: string): string => (/^[A-Z][a-z]/.test(label) ? label.charAt(0).toLowerCase() + label.slice(1) : label);

function clauseOf(setting: UsedSetting, point: ResultPoint, inDetector: boolean): Clause {
  const value = valueAt(setting, point);
  const words = special[setting.name];
  const text = words ? words(value, setting, inDetector) : `${lowered(settingLabel(setting.name))} ${printed(setting, value)}`;
  return { place: placeOf[setting.name] ?? 'other', text: marked(text, setting) };
}

const TOP = 'the lower of the curve’s end and the Nyquist frequency of the waveforms';

/** The band as it was integrated; an edge that nobody declared says where it came from. */
function bandClause(low: UsedSetting | undefined, high: UsedSetting | undefined, point: ResultPoint, curveEndHz: number | null): Clause {
  const from = low ? `${printed(low, valueAt(low, point))}${low.standing === 'assumed' ? ' (assumed: where the curve begins)' : ''}` : 'an unknown frequency';
  const top = high ? valueAt(high, point) : null;
  const why = curveEndHz !== null && top === curveEndHz ? 'where the curve ends' : TOP;
  const to = high ? `${printed(high, top)}${high.standing === 'assumed' ? ` (assumed: ${why})` : ''}` : 'an unknown frequency';
  return { place: 'band', text: `band from ${from} to ${to}` };
}

/** Mass and frame are one statement: either alone is the slip this sentence is there to prevent. */
function massClause(mass: UsedSetting | undefined, frame: UsedSetting | undefined, point: ResultPoint): Clause {
  const size = mass ? marked(`total mass ${printed(mass, valueAt(mass, point))}`, mass) : 'total mass as the files have it';
  const inFrame = frame ? marked(` in the ${formatSetting('', valueAt(frame, point))} frame`, frame) : ', mass frame not among the settings used';
  return { place: 'mass', text: size + inFrame };
}

const JOINED = ['fLowHz', 'fHighHz', 'totalMassMsun', 'massFrame'];

/** Every setting that was used, declared and assumed alike, in the order of the columns. */
export function settingClauses(claim: Pick<ResultClaim, 'settings'>, point: ResultPoint, inDetector: boolean, curveEndHz: number | null = null): readonly Clause[] {
  const named = (name: string) => claim.settings.find((setting) => setting.name === name);
  const rest = claim.settings.filter(({ name }) => !JOINED.includes(name)).map((setting) => clauseOf(setting, point, inDetector));
  const inPlace = (place: ClausePlace) => rest.filter((clause) => clause.place === place);
  const [low, high, mass, frame] = JOINED.map(named);
  return [
    ...(inDetector || low || high ? [bandClause(low, high, point, curveEndHz)] : []),
    ...inPlace('maximised'),
    ...(mass || frame ? [massClause(mass, frame, point)] : []),
    ...inPlace('mass'),
    ...inPlace('modes'),
    ...inPlace('other'),
  ];
}
