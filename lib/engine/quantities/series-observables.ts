import { houseLimitObservable } from '../contract/house-values';
import type { Follows, Quantity, QuantityInputs } from '../contract/quantity';
import type { DeclaredSettings, Observable, SettingName } from '../contract/settings';
import { cycles } from './cycles';
import { eccentricity } from './eccentricity';
import { peakLuminosity } from './peak-luminosity';
import { radiatedAngularMomentum } from './radiated-angular-momentum';
import { radiatedEnergy } from './radiated-energy';
import { recoil } from './recoil';
import { remnantMass } from './remnant-mass';
import { remnantSpin } from './remnant-spin';
import { ringdownDamping } from './ringdown-damping';
import { ringdownFrequency } from './ringdown-frequency';

/** Numbers of one waveform (settings.md section 5) that a series can be measured in. */
export const scalars: ReadonlyMap<string, Quantity> = new Map([radiatedEnergy, radiatedAngularMomentum, recoil, peakLuminosity, remnantMass, remnantSpin, ringdownFrequency, ringdownDamping, cycles, eccentricity].map((quantity) => [quantity.id, quantity]));

const curveSettings: readonly SettingName[] = ['modes', 'window', 'startM', 'integrationFloor'];
const peakSettings: readonly SettingName[] = ['modes', 'startM', 'integrationFloor'];

const peaks: Follows['words'] = { 'amplitude-at-peak': { unit: '', settings: peakSettings }, 'phase-at-peak': { unit: 'rad', settings: peakSettings } };
const curves: Follows['words'] = Object.fromEntries(['dominant', 'phase', 'amplitude', 'complex'].map((curve) => [curve, { unit: '', settings: curveSettings }]));
const numbers: Follows['words'] = Object.fromEntries([...scalars].map(([id, { unit, settings }]) => [id, { unit, settings }]));

const withAlso = (words: Follows['words'], also: readonly SettingName[], unit?: string): Follows['words'] =>
  Object.fromEntries(Object.entries(words).map(([word, row]) => [word, { unit: unit ?? row.unit, settings: [...new Set<SettingName>(['observable', ...also, ...(row.settings ?? [])])] }]));

export const orderWords = withAlso({ ...curves, 'phase-at-peak': peaks['phase-at-peak']!, ...numbers }, [], '');
export const valueWords = (also: readonly SettingName[]): Follows['words'] => withAlso({ ...numbers, ...peaks }, also);

/** Every setting that means something beside one of the words. */
export const settingsOfWords = (words: Follows['words']): readonly SettingName[] => [...new Set(Object.values(words).flatMap(({ settings }) => settings ?? []))];

export const unitOfObservable = (observable: string): string => scalars.get(observable)?.unit ?? peaks[observable]?.unit ?? '';

/** That of the observable; at a peak, that of a difference of amplitudes or phases. */
export function toleranceOfObservable(value: number, declared: DeclaredSettings | undefined): number {
  const observable = declared?.observable ?? houseLimitObservable;
  if (observable === 'amplitude-at-peak') return 1e-3 * Math.abs(value);
  if (observable === 'phase-at-peak') return 0.02;
  return scalars.get(observable)?.naturalTolerance(value, declared) ?? Number.NaN;
}

/** What the observable's own quantity needs of any of the runs. */
export function neededByObservable({ of }: QuantityInputs, declared: DeclaredSettings, houseDefault: Observable): readonly SettingName[] {
  const quantity = scalars.get(declared.observable ?? houseDefault);
  return quantity === undefined ? [] : [...new Set((of.series ?? []).flatMap((a) => quantity.required({ of: { a }, noise: null }, declared, null)))];
}
