import type { WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { Quantity, QuantityInputs } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings, ModeIndex, SettingName } from '@/lib/engine/contract/settings';
import type { LineOfSight, ModeSet, Waveform } from '@/lib/engine/contract/waveform';
import type { Problem } from '@/lib/kernel/problem';
import { didYouMean } from './nearest-name';
import { laterRoles } from './catalogue';
import { describe, pointer } from './pointer';
import type { Sweep } from './claim-settings';

type Path = readonly PropertyKey[];
export type Declared = { readonly a?: WaveformDeclaration; readonly b?: WaveformDeclaration };

/** The roles that a quantity takes, each naming a waveform of this sheet. */
export function parseRoles(raw: Readonly<Record<string, unknown>>, quantity: Quantity, names: readonly string[], path: Path, problems: Problem[]): { a?: string; b?: string } {
  const roles: { a?: string; b?: string } = {};
  for (const role of quantity.roles) if (!(role in raw)) problems.push({ code: 'claims/missing', where: pointer(...path, role), saw: 'nothing', expected: `a waveform of this sheet as "${role}" of ${quantity.id}` });
  for (const [role, name] of Object.entries(raw)) {
    const where = pointer(...path, role);
    const known = role === 'a' || role === 'b' ? quantity.roles.find((r) => r === role) : undefined;
    if (known === undefined) {
      const hint = didYouMean(role, [...quantity.roles, ...laterRoles]);
      problems.push({ code: 'claims/unknown-name', where, saw: `the role ${describe(role)}`, expected: `only ${quantity.roles.map((r) => `"${r}"`).join(' and ')} for ${quantity.id}`, ...(hint && quantity.roles.length > 0 ? { hint } : {}) });
    } else if (typeof name !== 'string' || !names.includes(name)) {
      const hint = typeof name === 'string' ? didYouMean(name, names) : undefined;
      problems.push({ code: 'claims/unknown-waveform', where, saw: describe(name), expected: names.length > 0 ? `a waveform of this sheet (${names.join(', ')})` : 'a waveform of this sheet', ...(hint ? { hint } : {}) });
    } else roles[known] = name;
  }
  return roles;
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
  const waveforms = [of.a, of.b].filter((w) => w !== undefined);
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
  const inputs: QuantityInputs = { of: { ...(of.a ? { a: declaredWaveform(of.a) } : {}), ...(of.b ? { b: declaredWaveform(of.b) } : {}) }, noise: null };
  return quantity
    .required(inputs, settings, sweep?.setting ?? null)
    .filter((name) => settings[name] === undefined && sweep?.setting !== name)
    .map((name) => ({ code: 'claims/missing', where: pointer(...path, 'settings', name), saw: 'nothing', expected: `the setting "${name}": ${quantity.id} has no default for it with these waveforms` }));
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
    significantDigits: null,
  };
}

function declaredContent(w: WaveformDeclaration): ModeSet | LineOfSight {
  const empty = () => new Float64Array(2);
  const has = (kind: string) => w.columns.some(({ role }) => role.kind === kind);
  if (has('plus')) return { kind: 'line-of-sight', plus: empty(), cross: has('cross') ? empty() : null };
  if (w.domain === 'frequency' && w.modeAssumed && w.timeUnit === 'Hz') return { kind: 'line-of-sight', plus: empty(), plusIm: empty(), cross: null, crossIm: null };
  const named = w.columns.flatMap(({ role }) => ('mode' in role && role.mode ? [role.mode] : []));
  const filed = w.files.flatMap(({ mode }) => (mode ? [mode] : []));
  const modes: readonly ModeIndex[] = named.length > 0 ? named : filed.length > 0 ? filed : [w.mode];
  const once = new Map(modes.map((mode) => [String(mode), mode]));
  return { kind: 'modes', modes: [...once.values()].map(([l, m]) => ({ l, m, re: empty(), im: empty() })) };
}
