import type { Quantity } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings, SettingName } from '@/lib/engine/contract/settings';
import type { SweptValue } from '@/lib/kernel/place';
import type { Problem } from '@/lib/kernel/problem';
import type { Catalogue } from './catalogue';
import { checkPart, unknownName } from './check-part';
import { describe, pointer } from './pointer';
import { settingSchema, sweptExpectation, sweptSchema, sweptValue } from './setting-schema';

const mostSwept = 2000;
type Path = readonly PropertyKey[];
export type Sweep = { readonly setting: SettingName; readonly values: readonly SweptValue[] };

/** Settings of one claim: known, allowed for its quantity, of the right type, inside their range. */
export function parseSettings(raw: Readonly<Record<string, unknown>>, quantity: Quantity, catalogue: Catalogue, path: Path, problems: Problem[]): DeclaredSettings {
  const settings: Record<string, unknown> = {};
  for (const [name, value] of Object.entries(raw)) {
    const fault = settingFault(name, quantity, catalogue, path);
    if (fault) problems.push(fault);
    const row = catalogue.settings.get(name);
    if (!row) continue;
    const parsed = checkPart(settingSchema(row), value, [...path, name], [], problems);
    if (!fault && parsed !== null) {
      problems.push(...choiceProblems(name, parsed, quantity, [...path, name]));
      settings[name] = parsed;
    }
  }
  problems.push(...unfollowed(settings, quantity, path));
  const { fLowHz, fHighHz } = settings as DeclaredSettings;
  if (fLowHz !== undefined && fHighHz !== undefined && !(fHighHz > fLowHz)) problems.push(bandOrder(fHighHz, fLowHz, [...path, 'fHighHz']));
  return settings;
}

/** Allowed for the quantity, but without meaning beside the word of another setting. */
function unfollowed(settings: Readonly<Record<string, unknown>>, quantity: Quantity, path: Path): Problem[] {
  const { follows } = quantity;
  if (!follows) return [];
  const word = String(settings[follows.setting] ?? follows.houseDefault);
  const meant: readonly string[] = follows.words[word]?.settings ?? quantity.settings;
  return Object.keys(settings)
    .filter((name) => !meant.includes(name))
    .map((name) => ({ code: 'claims/setting-not-for-quantity', where: pointer(...path, name), saw: `the setting "${name}"`, expected: `a setting of ${quantity.id} with ${follows.setting} "${word}": ${meant.join(', ')}` }));
}

const bandOrder = (high: number, low: number, path: Path): Problem => ({ code: 'claims/out-of-range', where: pointer(...path), saw: `an upper edge of ${high} Hz with a lower edge of ${low} Hz`, expected: 'fHighHz above fLowHz' });

function settingFault(name: string, quantity: Quantity, catalogue: Catalogue, path: Path): Problem | null {
  const allowed: readonly string[] = quantity.settings;
  if (allowed.includes(name)) return null;
  if (!catalogue.settings.has(name)) return unknownName(name, path, allowed);
  const hint = whyNot(name, quantity.id);
  return { code: 'claims/setting-not-for-quantity', where: pointer(...path, name), saw: `the setting "${name}"`, expected: `a setting of ${quantity.id}: ${allowed.join(', ')}`, ...(hint ? { hint } : {}) };
}

/** A word of the setting that this quantity has no meaning for. */
function choiceProblems(name: string, value: unknown, quantity: Quantity, path: Path): Problem[] {
  const choices = quantity.choices?.[name as SettingName];
  if (!choices) return [];
  const words = typeof value === 'object' && value !== null ? Object.keys(value) : [String(value)];
  return words.every((word) => choices.includes(word)) ? [] : [{ code: 'claims/not-allowed', where: pointer(...path), saw: describe(value), expected: `one of ${choices.map((choice) => `"${choice}"`).join(', ')} for ${quantity.id}` }];
}

/** Where the reason is not plain from the list of what is allowed. */
function whyNot(name: string, quantity: string): string | undefined {
  if (name === 'maximise' && quantity === 'overlap') return 'An overlap is not maximised; the quantity "match" is.';
  if (name === 'includeEnergyBeforeStart' && quantity === 'radiated-angular-momentum') return 'The angular momentum radiated since infinite separation has no bound; only that of the record can be claimed.';
  return undefined;
}

/** `over`: exactly one setting that this quantity lets sweep, with a list of values in range. */
export function parseSweep(raw: Readonly<Record<string, unknown>>, quantity: Quantity, declared: Readonly<Record<string, unknown>>, catalogue: Catalogue, path: Path, problems: Problem[]): Sweep | null {
  const names = Object.keys(raw);
  const sweepable: readonly string[] = quantity.sweepable;
  if (names.length !== 1) {
    problems.push({ code: 'claims/sweep', where: pointer(...path), saw: names.length === 0 ? 'no swept setting' : `the settings ${names.join(', ')}`, expected: 'exactly one swept setting', ...(names.length > 1 ? { hint: 'Make one claim for each.' } : {}) });
    return null;
  }
  const name = names[0] ?? '';
  const at = [...path, name];
  const row = catalogue.settings.get(name);
  if (!row || !sweepable.includes(name)) {
    problems.push(row !== undefined ? { code: 'claims/sweep', where: pointer(...at), saw: `a sweep over "${name}"`, expected: `a sweep over one of ${sweepable.join(', ')}` } : unknownName(name, path, sweepable));
    return null;
  }
  if (name in declared) problems.push({ code: 'claims/sweep', where: pointer(...at), saw: `"${name}" both in "settings" and in "over"`, expected: 'it in one of the two' });
  return { setting: row.name, values: sweptValues(raw[name], row, at, problems) };
}

function sweptValues(values: unknown, row: Parameters<typeof settingSchema>[0], at: Path, problems: Problem[]): SweptValue[] {
  if (!Array.isArray(values) || values.length === 0 || values.length > mostSwept) {
    problems.push({ code: 'claims/sweep', where: pointer(...at), saw: describe(values), expected: `a list of 1 to ${mostSwept} values` });
    return [];
  }
  const schema = sweptSchema(row);
  return values.flatMap((value, i) => {
    const parsed = checkPart(schema, value, [...at, i], [], problems);
    const swept = sweptValue(row, parsed);
    if (swept !== null) return [swept];
    if (parsed !== null) problems.push({ code: 'claims/sweep', where: pointer(...at, i), saw: describe(value), expected: sweptExpectation(row) });
    return [];
  });
}

/** Every swept edge against the other, declared one. */
export function sweptBandProblems(settings: DeclaredSettings, sweep: Sweep | null, path: Path): Problem[] {
  if (!sweep) return [];
  return sweep.values.flatMap((value, i) => {
    if (typeof value !== 'number') return [];
    const low = sweep.setting === 'fLowHz' ? value : settings.fLowHz;
    const high = sweep.setting === 'fHighHz' ? value : settings.fHighHz;
    const swept = sweep.setting === 'fLowHz' || sweep.setting === 'fHighHz';
    return swept && low !== undefined && high !== undefined && !(high > low) ? [bandOrder(high, low, [...path, sweep.setting, i])] : [];
  });
}
