import { parseClaimed } from '@/lib/claims/claimed';
import { claimedFrom, settingFrom, type ClaimFields } from './claim-fields';
import type { QuantityRow } from './quantity-row';

export interface PasteRoom {
  readonly catalogue: readonly QuantityRow[];
  readonly waveforms: readonly string[];
  readonly noise: readonly string[];
}

/** What is wrong with one cell, where something is: column to sentence. */
export type CellProblems = Readonly<Record<string, string>>;

/** Each cell by itself, before anything is filled in; how they go together is for the check. */
export function cellProblems(claim: ClaimFields, { catalogue, waveforms, noise }: PasteRoom): CellProblems {
  const quantity = catalogue.find(({ id }) => id === claim.quantity);
  const found: Record<string, string | null> = {
    quantity: quantity ? null : `“${claim.quantity}” is no quantity; expected one of ${catalogue.map(({ id }) => id).join(', ')}.`,
    a: unlisted(claim.a, waveforms, 'waveform'),
    b: unlisted(claim.b, waveforms, 'waveform'),
    em: unlisted(claim.em, waveforms, 'waveform'),
    gw: unlisted(claim.gw, waveforms, 'waveform'),
    noise: unlisted(claim.noise, noise, 'noise curve'),
    claimed: claim.claimed.split(';').map(claimedProblem).find((problem) => problem !== null) ?? null,
    tolerance: claim.tolerance === '' || Number(claim.tolerance) > 0 ? null : `“${claim.tolerance}” is no tolerance; expected a number above zero.`,
    ...Object.fromEntries(Object.entries(claim.settings).map(([name, typed]) => [name, quantity ? settingProblem(name, typed, quantity) : null])),
    ...(claim.overSetting === '' || !quantity ? {} : { [claim.overSetting]: claim.overValues.split(';').map((value) => settingProblem(claim.overSetting, value, quantity)).find((problem) => problem !== null) ?? null }),
  };
  return Object.fromEntries(Object.entries(found).filter((entry): entry is [string, string] => entry[1] !== null));
}

const unlisted = (name: string, known: readonly string[], what: string): string | null =>
  name === '' || known.includes(name) ? null : `“${name}” is no ${what} of this draft; declare it, or correct its name.`;

function claimedProblem(typed: string): string | null {
  if (typed.trim() === '') return 'No value is claimed here; expected a number such as 0.9984(3).';
  const parsed = parseClaimed(claimedFrom(typed));
  return parsed.ok ? null : `Saw ${parsed.error.saw}; expected a number such as 0.9984(3), or a bound such as > 0.999.${parsed.error.hint ? ` ${parsed.error.hint}` : ''}`;
}

function settingProblem(name: string, typed: string, quantity: QuantityRow): string | null {
  const row = quantity.settings.find((setting) => setting.name === name);
  if (!row) return `${name} is no setting of this quantity.`;
  const { shape, unit } = row;
  const value = settingFrom(name, typed);
  if (shape.kind === 'number') {
    if (typeof value !== 'number') return `“${typed.trim()}” is no number; expected ${name}${unit && ` in ${unit}`}.`;
    const fits = (shape.min === undefined || value >= shape.min) && (shape.max === undefined || value <= shape.max) && (shape.above === undefined || value > shape.above);
    return fits ? null : `${typed.trim()} is outside the range of ${name}: ${shape.above === undefined ? `${shape.min ?? 'any'} to ${shape.max ?? 'any'}` : `above ${shape.above}`} ${unit}`.trim() + '.';
  }
  if (shape.kind === 'integer') return Number.isInteger(value) && (value as number) >= shape.min && (value as number) <= shape.max ? null : `“${typed.trim()}” does not fit; expected a whole number from ${shape.min} to ${shape.max}.`;
  if (shape.kind === 'choice') return shape.options.includes(value as string | boolean) ? null : `“${typed.trim()}” is no choice; expected one of ${shape.options.map(String).join(', ')}.`;
  return null;
}

/** Rows that differ in one setting alone are one claim over that setting; null where they are not. */
export function asSweep(claims: readonly ClaimFields[], catalogue: readonly QuantityRow[]): ClaimFields | null {
  const [first, ...others] = claims;
  if (!first || others.length === 0) return null;
  const alike = others.every(({ quantity, a, b, em, gw, series, noise, tolerance, overSetting, settings }) => quantity === first.quantity && a === first.a && b === first.b && em === first.em && gw === first.gw && series === first.series && noise === first.noise && tolerance === first.tolerance && overSetting === '' && Object.keys(settings).length === Object.keys(first.settings).length);
  const differing = Object.keys(first.settings).filter((name) => others.some(({ settings }) => settings[name] !== first.settings[name]));
  const [swept] = differing;
  const sweepable: readonly string[] = catalogue.find(({ id }) => id === first.quantity)?.sweepable ?? [];
  if (!alike || first.overSetting !== '' || differing.length !== 1 || swept === undefined || !sweepable.includes(swept)) return null;
  const { [swept]: _own, ...settings } = first.settings;
  return { ...first, settings, overSetting: swept, overValues: claims.map((claim) => claim.settings[swept] ?? '').join('; '), claimed: claims.map(({ claimed }) => claimed).join('; ') };
}
