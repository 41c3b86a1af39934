import type { WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { ListRole, Quantity, QuantityInputs, Role, SingleRole } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings, ModeIndex, SettingName } from '@/lib/engine/contract/settings';
import type { LineOfSight, ModeSet, Variable, Waveform } from '@/lib/engine/contract/waveform';
import type { Problem } from '@/lib/kernel/problem';
import type { ClaimRoles } from './claim';
import { didYouMean } from './nearest-name';
import { describe, pointer } from './pointer';
import { everyRole, isList } from './roles';
import type { Sweep } from './claim-settings';

type Path = readonly PropertyKey[];
export type Declared = { readonly [role in Role]?: readonly WaveformDeclaration[] };

type Waveforms = ReadonlyMap<string, WaveformDeclaration | null>;
const mostListed = 500;

/** The roles that a quantity takes, each naming a waveform, a series or a list of waveforms of this sheet. */
export function parseRoles(raw: Readonly<Record<string, unknown>>, quantity: Quantity, waveforms: Waveforms, path: Path, problems: Problem[]): ClaimRoles {
  const roles: { -readonly [role in SingleRole]?: string } & { -readonly [role in ListRole]?: readonly string[] } = {};
  const optional = quantity.optionalRoles ?? [];
  for (const role of quantity.roles)
    if (!(role in raw) && !optional.includes(role)) problems.push({ code: 'claims/missing', where: pointer(...path, role), saw: 'nothing', expected: `${wanted(role)} of this sheet as "${role}" of ${quantity.id}` });
  for (const [name, value] of Object.entries(raw)) {
    const role = quantity.roles.find((r) => r === name);
    const at = [...path, name];
    if (role === undefined) problems.push(unknownRole(name, quantity, at));
    else if (role === 'series') roles.series = seriesMembers(value, waveforms, at, problems);
    else if (isList(role)) roles[role] = listed(value, waveforms, at, problems);
    else if (isWaveform(value, waveforms, at, problems)) roles[role] = value;
  }
  return roles;
}

const wanted = (role: Role): string => (role === 'series' ? 'a series' : isList(role) ? 'a list of waveforms' : 'a waveform');

function unknownRole(name: string, quantity: Quantity, at: Path): Problem {
  const hint = didYouMean(name, everyRole);
  const expected = quantity.roles.length === 0 ? `nothing in "of" for ${quantity.id}` : `only ${quantity.roles.map((r) => `"${r}"`).join(' and ')} for ${quantity.id}`;
  return { code: 'claims/unknown-name', where: pointer(...at), saw: `the role ${describe(name)}`, expected, ...(hint && quantity.roles.length > 0 ? { hint } : {}) };
}

function isWaveform(value: unknown, waveforms: Waveforms, at: Path, problems: Problem[]): value is string {
  const names = [...waveforms.keys()];
  if (typeof value === 'string' && names.includes(value)) return true;
  const hint = typeof value === 'string' ? didYouMean(value, names) : undefined;
  problems.push({ code: 'claims/unknown-waveform', where: pointer(...at), saw: describe(value), expected: names.length > 0 ? `a waveform of this sheet (${shortList(names)})` : 'a waveform of this sheet', ...(hint ? { hint } : {}) });
  return false;
}

const shortList = (names: readonly string[]): string => (names.length > 30 ? `${names.slice(0, 30).join(', ')}, …` : names.join(', '));

function listed(value: unknown, waveforms: Waveforms, at: Path, problems: Problem[]): string[] {
  if (!Array.isArray(value) || value.length === 0 || value.length > mostListed) {
    problems.push({ code: 'claims/unknown-waveform', where: pointer(...at), saw: describe(value), expected: `a list of 1 to ${mostListed} waveforms of this sheet` });
    return [];
  }
  const names = value.filter((name, i): name is string => isWaveform(name, waveforms, [...at, i], problems));
  const twice = names.find((name, i) => names.indexOf(name) < i);
  if (twice !== undefined) problems.push({ code: 'claims/not-allowed', where: pointer(...at), saw: `${describe(twice)} twice`, expected: 'each waveform once' });
  return names;
}

function seriesMembers(value: unknown, waveforms: Waveforms, at: Path, problems: Problem[]): string[] {
  const known = [...new Set([...waveforms.values()].flatMap((w) => (w?.run.series === undefined ? [] : [w.run.series])))];
  // A waveform that did not parse may have been a member; its own problem is told.
  if (typeof value === 'string' && known.includes(value)) return [...waveforms].filter(([, w]) => w?.run.series === value).map(([name]) => name);
  const hint = typeof value === 'string' ? didYouMean(value, known) : undefined;
  const expected = known.length > 0 ? `a series of this sheet (${shortList(known)})` : 'a series of this sheet: the "series" that several of its waveforms name';
  problems.push({ code: 'claims/unknown-waveform', where: pointer(...at), saw: describe(value), expected, ...(hint ? { hint } : {}) });
  return [];
}

/** The declarations behind the names, as far as they parsed. */
export function declaredRoles(of: ClaimRoles, waveforms: Waveforms): Declared {
  return Object.fromEntries(Object.entries(of).map(([role, names]) => [role, [names].flat().flatMap((name) => waveforms.get(name) ?? [])]));
}

const gravitational: readonly Variable[] = ['strain', 'news', 'psi4'];

/** Does each waveform hold what its role computes with? */
export function variableProblems(quantity: Quantity, of: Declared, path: Path): Problem[] {
  return quantity.roles.flatMap((role) => {
    const taken = quantity.accepts?.[role] ?? gravitational;
    return (of[role] ?? []).flatMap((w) =>
      taken.includes(w.variable) ? [] : [{ code: 'claims/variable', where: pointer(...path, 'of', role), saw: `${describe(w.name)}, which holds ${w.variable}`, expected: `${taken.join(', ')} as "${role}" of ${quantity.id}` }],
    );
  });
}

export function parseNoiseName(raw: string | undefined, quantity: Quantity, names: readonly string[], path: Path, problems: Problem[]): string | null {
  const where = pointer(...path, 'noise');
  if (!quantity.needsNoise) {
    if (raw !== undefined) problems.push({ code: 'claims/not-allowed', where, saw: describe(raw), expected: `no noise curve for ${quantity.id}` });
    return null;
  }
  if (raw === undefined) problems.push({ code: 'claims/missing', where, saw: 'nothing', expected: `a noise curve of this sheet${names.length > 0 ? ` (${names.join(', ')})` : ''}` });
  else if (!names.includes(raw)) {
    const hint = didYouMean(raw, names);
    problems.push({ code: 'claims/unknown-noise', where, saw: describe(raw), expected: `a noise curve of this sheet${names.length > 0 ? ` (${names.join(', ')})` : ''}`, ...(hint ? { hint } : {}) });
  }
  return raw ?? null;
}

const isLineOfSight = (w: WaveformDeclaration): boolean => declaredContent(w).kind === 'line-of-sight';
const isPhysical = (w: WaveformDeclaration): boolean => w.amplitudeUnit === 'strain';

/** What depends on setting and waveform together: angles without harmonics, masses without a scale. */
export function settingAgainstWaveforms(settings: DeclaredSettings, sweep: Sweep | null, of: Declared, path: Path): Problem[] {
  const waveforms = Object.values(of).flat();
  const problems: Problem[] = [];
  const placeOf = (name: SettingName): Path | null => (settings[name] !== undefined ? [...path, 'settings', name] : sweep?.setting === name ? [...path, 'over', name] : null);
  const sighted = waveforms.filter(isLineOfSight);
  for (const name of ['inclinationRad', 'azimuthRad'] as const) {
    const place = placeOf(name);
    if (place && sighted.length > 0 && sighted.length === waveforms.length)
      problems.push({ code: 'claims/angle-without-modes', where: pointer(...place), saw: `"${name}" for ${sighted.map((w) => describe(w.name)).join(' and ')}`, expected: 'no angle for strain along one line of sight: plus and cross columns are already projected', hint: 'Remove the setting, or attach the modes.' });
  }
  for (const name of ['totalMassMsun', 'distanceMpc'] as const) {
    const place = placeOf(name);
    if (place) problems.push(...waveforms.filter(isPhysical).flatMap((w) => noOwnScale(name, w, place)));
  }
  return problems;
}

/** Physical strain is stretched only from a known mass and distance (settings.md rule 2.6). */
function noOwnScale(name: SettingName, w: WaveformDeclaration, place: Path): Problem[] {
  const absent = [w.totalMassMsun === null ? 'totalMassMsun' : '', w.distanceMpc === null ? 'distanceMpc' : ''].filter((word) => word !== '');
  if (absent.length === 0) return [];
  return [{
    code: 'claims/no-own-scale', where: pointer(...place),
    saw: `"${name}" for the physical strain ${describe(w.name)}, which states no ${absent.join(' and no ')} of its own`,
    expected: `the file’s own totalMassMsun and distanceMpc in "waveforms"`,
    hint: 'Physical strain is used as it stands; it can be restretched only from a known mass and distance.',
  }];
}

/** Settings that this claim needs and does not have. */
export function missingSettings(quantity: Quantity, settings: DeclaredSettings, sweep: Sweep | null, of: Declared, path: Path): Problem[] {
  const inputs: QuantityInputs = { of: inputRoles(Object.fromEntries(Object.entries(of).map(([role, list]) => [role, list.map(declaredWaveform)]))), noise: null };
  return quantity
    .required(inputs, settings, sweep?.setting ?? null)
    .filter((name) => settings[name] === undefined && sweep?.setting !== name)
    .map((name) => ({ code: 'claims/missing', where: pointer(...path, 'settings', name), saw: 'nothing', expected: `the setting "${name}": ${quantity.id} has no default for it with these waveforms` }));
}

/** One waveform for a single role, the list for the others. */
export function inputRoles(of: { readonly [role in Role]?: readonly Waveform[] }): QuantityInputs['of'] {
  const entries = Object.entries(of).map(([role, list]): readonly [string, readonly Waveform[] | Waveform | undefined] => [role, isList(role as Role) ? list : list[0]]);
  return Object.fromEntries(entries.filter(([, value]) => value !== undefined));
}

/** The waveform as far as its declaration tells, with two empty samples: enough to ask what a claim needs. */
export function declaredWaveform(w: WaveformDeclaration): Waveform {
  return {
    name: w.name,
    domain: w.domain,
    unit: w.timeUnit === 'M' || w.timeUnit === '1/M' ? 'M' : 's',
    amplitudeUnit: w.amplitudeUnit,
    variable: w.variable,
    axis: Float64Array.of(1, 2),
    uniformStep: 1,
    content: declaredContent(w),
    negativeM: w.negativeM,
    ownTotalMassMsun: w.totalMassMsun,
    ownDistanceMpc: w.distanceMpc,
    junkEndM: w.junkEndM,
    binary: w.binary,
    ...w.run,
    significantDigits: null,
  };
}

function declaredContent(w: WaveformDeclaration): ModeSet | LineOfSight {
  const empty = () => new Float64Array(2);
  const has = (kind: string) => w.columns.some(({ role }) => role.kind === kind);
  if (has('plus') || has('luminosity')) return { kind: 'line-of-sight', plus: empty(), cross: has('cross') ? empty() : null };
  if (w.domain === 'frequency' && w.modeAssumed && w.timeUnit === 'Hz') return { kind: 'line-of-sight', plus: empty(), plusIm: empty(), cross: null, crossIm: null };
  const named = w.columns.flatMap(({ role }) => ('mode' in role && role.mode ? [role.mode] : []));
  const filed = w.files.flatMap(({ mode }) => (mode ? [mode] : []));
  const modes: readonly ModeIndex[] = named.length > 0 ? named : filed.length > 0 ? filed : [w.mode];
  const once = new Map(modes.map((mode) => [String(mode), mode]));
  return { kind: 'modes', modes: [...once.values()].map(([l, m]) => ({ l, m, re: empty(), im: empty() })) };
}
