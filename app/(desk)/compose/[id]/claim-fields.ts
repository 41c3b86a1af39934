import type { SettingShape } from '@/lib/engine/quantities/settings-table';
import { settingsTable } from '@/lib/engine/quantities/settings-table';
import type { SettingName } from '@/lib/engine/contract/settings';

type Json = Readonly<Record<string, unknown>>;

export interface ClaimFields {
  id: string;
  quantity: string;
  /** Names of waveforms, and of a series; empty where the claim names none. */
  a: string;
  b: string;
  em: string;
  gw: string;
  series: string;
  signals: string[];
  templates: string[];
  noise: string;
  /** By setting, as typed; an empty text is undeclared. */
  settings: Record<string, string>;
  /** The swept setting and its values; empty for a single number. */
  overSetting: string;
  overValues: string;
  /** One value, or one for each swept value with `;` between. See `claimedFrom`. */
  claimed: string;
  tolerance: string;
  /** Words of `of` that the form does not know; the check tells of them. */
  otherRoles: Json;
  rest: Json;
}

const singleNames = ['a', 'b', 'em', 'gw', 'series'] as const;
const listNames = ['signals', 'templates'] as const;
export type RoleField = (typeof singleNames)[number] | (typeof listNames)[number];
export const isListField = (role: RoleField): role is (typeof listNames)[number] => (listNames as readonly RoleField[]).includes(role);

const known = ['id', 'quantity', 'of', 'noise', 'settings', 'over', 'claimed', 'tolerance'];
const text = (value: unknown): string => (typeof value === 'string' ? value : typeof value === 'number' ? String(value) : '');

export function settingText(value: unknown): string {
  if (value === undefined || value === null) return '';
  return typeof value === 'object' ? JSON.stringify(value) : String(value);
}

function parsed(typed: string): unknown {
  try {
    return JSON.parse(typed);
  } catch {
    return typed;
  }
}

/** What was typed, in the type that the setting asks for; else the text itself, for the check to quote. */
export function settingFrom(name: string, typed: string): unknown {
  const trimmed = typed.trim();
  if (trimmed === '') return undefined;
  const shape: SettingShape | undefined = settingsTable.get(name as SettingName)?.shape;
  if (!shape) return parsed(trimmed);
  if (shape.kind === 'choice') return shape.options.find((option) => String(option) === trimmed) ?? trimmed;
  if (shape.kind === 'subset' && !trimmed.startsWith('[')) return trimmed.split(/[\s,;]+/);
  // A bare number at a place is the one that can be swept: a time, for `at`.
  if (shape.kind === 'place' && shape.swept !== undefined && Number.isFinite(Number(trimmed))) return { [shape.swept]: Number(trimmed) };
  return parsed(trimmed);
}

/**
 * A claimed value as typed. `0.9984(3)` keeps its digits; `> 0.999` and `< 0.1` are bounds; `= 0.9984`
 * says that the number is exact and no digit of it is rounded.
 */
export function claimedFrom(typed: string): unknown {
  const trimmed = typed.trim();
  const bound = /^([<>])=?\s*(.+)$/.exec(trimmed);
  if (bound) {
    const value = Number(bound[2]);
    return { [bound[1] === '>' ? 'above' : 'below']: Number.isFinite(value) ? value : bound[2] };
  }
  const exact = /^=\s*(.+)$/.exec(trimmed);
  if (exact && Number.isFinite(Number(exact[1]))) return Number(exact[1]);
  return parsedObject(trimmed) ?? trimmed;
}

const parsedObject = (typed: string): unknown => (typed.startsWith('{') ? parsed(typed) : undefined);

export function claimedText(claimed: unknown): string {
  if (Array.isArray(claimed)) return claimed.map(claimedText).join('; ');
  if (typeof claimed === 'number') return `= ${claimed}`;
  if (typeof claimed !== 'object' || claimed === null) return text(claimed);
  const { above, below } = claimed as { readonly above?: unknown; readonly below?: unknown };
  if (above !== undefined) return `> ${text(above)}`;
  return below === undefined ? JSON.stringify(claimed) : `< ${text(below)}`;
}

export function fieldsFromClaim(claim: Json): ClaimFields {
  const of = (claim.of ?? {}) as Json;
  const [over] = Object.entries((claim.over ?? {}) as Json);
  return {
    id: text(claim.id),
    quantity: text(claim.quantity),
    ...(Object.fromEntries(singleNames.map((role) => [role, text(of[role])])) as Pick<ClaimFields, (typeof singleNames)[number]>),
    ...(Object.fromEntries(listNames.map((role) => [role, Array.isArray(of[role]) ? of[role].map(String) : []])) as unknown as Pick<ClaimFields, (typeof listNames)[number]>),
    otherRoles: Object.fromEntries(Object.entries(of).filter(([role]) => !([...singleNames, ...listNames] as readonly string[]).includes(role))),
    noise: text(claim.noise),
    settings: Object.fromEntries(Object.entries((claim.settings ?? {}) as Json).map(([name, value]) => [name, settingText(value)])),
    overSetting: over?.[0] ?? '',
    overValues: Array.isArray(over?.[1]) ? over[1].map(settingText).join('; ') : '',
    claimed: claimedText(claim.claimed),
    tolerance: text(claim.tolerance),
    rest: Object.fromEntries(Object.entries(claim).filter(([name]) => !known.includes(name))),
  };
}

const parts = (typed: string): string[] => typed.split(';').map((part) => part.trim()).filter((part) => part !== '');

export function claimFromFields(fields: ClaimFields): Json {
  const settings = Object.fromEntries(Object.entries(fields.settings).map(([name, typed]) => [name, settingFrom(name, typed)] as const).filter(([, value]) => value !== undefined));
  const tolerance = fields.tolerance.trim();
  const entries = parts(fields.claimed).map(claimedFrom);
  // One inequality stands for every value of the sweep.
  const oneBound = entries.length === 1 && /^[<>]/.test(fields.claimed.trim());
  const claimed = fields.overSetting && !oneBound ? entries : claimedFrom(fields.claimed);
  return {
    id: fields.id.trim(),
    quantity: fields.quantity,
    of: {
      ...Object.fromEntries(singleNames.flatMap((role) => (fields[role] ? [[role, fields[role]]] : []))),
      ...Object.fromEntries(listNames.flatMap((role) => (fields[role].length > 0 ? [[role, fields[role]]] : []))),
      ...fields.otherRoles,
    },
    ...(fields.noise ? { noise: fields.noise } : {}),
    ...(Object.keys(settings).length > 0 ? { settings } : {}),
    ...(fields.overSetting ? { over: { [fields.overSetting]: parts(fields.overValues).map((v) => settingFrom(fields.overSetting, v)) } } : {}),
    claimed,
    ...(tolerance ? { tolerance: Number.isFinite(Number(tolerance)) ? Number(tolerance) : tolerance } : {}),
    ...fields.rest,
  };
}

/** `C1`, `C2`, …: the first that is free. */
export function nextClaimId(taken: readonly string[]): string {
  for (let i = 1; ; i++) if (!taken.includes(`C${i}`)) return `C${i}`;
}

export const emptyClaim = (taken: readonly string[], like?: ClaimFields): ClaimFields => ({
  ...(like ?? fieldsFromClaim({})),
  settings: { ...like?.settings },
  signals: [...(like?.signals ?? [])],
  templates: [...(like?.templates ?? [])],
  quantity: like?.quantity ?? 'match',
  id: nextClaimId(taken),
});
