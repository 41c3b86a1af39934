import type { NoiseDeclaration, WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { Quantity } from '@/lib/engine/contract/quantity';
import type { Problem } from '@/lib/kernel/problem';
import type { Catalogue } from './catalogue';
import { checkPart, notRefused, soundEntries } from './check-part';
import type { Claim } from './claim';
import { declaredRoles, missingSettings, parseNoiseName, parseRoles, settingAgainstWaveforms, variableProblems } from './claim-inputs';
import { parseSettings, parseSweep, sweptBandProblems, type Sweep } from './claim-settings';
import { parseClaimed, type Claimed } from './claimed';
import { didYouMean } from './nearest-name';
import { describe, pointer } from './pointer';
import { claimSchema, type RawClaim } from './sheet-schema';

/** What the rest of the sheet offers a claim. Entries that did not parse are null: their names still count as known. */
export interface Surroundings {
  readonly waveforms: ReadonlyMap<string, WaveformDeclaration | null>;
  readonly noise: ReadonlyMap<string, NoiseDeclaration | null>;
  readonly catalogue: Catalogue;
}

const known = Object.keys(claimSchema.shape);

/** One entry of `claims`, or null beside every problem it has: an entry that is off hides no fault of the others. */
export function parseClaim(value: unknown, index: number, around: Surroundings, problems: Problem[]): Claim | null {
  const path = ['claims', index];
  const whole = checkPart(claimSchema, value, path, known, problems);
  const raw = whole ?? soundEntries(claimSchema, value);
  if (raw === null) return null;
  const quantity = raw.quantity === undefined ? undefined : around.catalogue.quantities.get(raw.quantity);
  if (!quantity) {
    problems.push(...withoutQuantity(raw, path, around));
    return null;
  }
  const found: Problem[] = [];
  const claim = parseParts(raw, quantity, path, around, found);
  problems.push(...found);
  return whole === null || found.length > 0 ? null : { id: whole.id, tolerance: whole.tolerance ?? null, ...claim };
}

function parseParts(raw: Partial<RawClaim>, quantity: Quantity, path: readonly PropertyKey[], around: Surroundings, problems: Problem[]): Omit<Claim, 'id' | 'tolerance'> {
  const of = raw.of === undefined ? {} : parseRoles(raw.of, quantity, around.waveforms, [...path, 'of'], problems);
  const noise = parseNoiseName(raw.noise, quantity, [...around.noise.keys()], path, problems);
  const settings = parseSettings(raw.settings ?? {}, quantity, around.catalogue, [...path, 'settings'], problems);
  const over = raw.over === undefined ? null : parseSweep(raw.over, quantity, raw.settings ?? {}, around.catalogue, [...path, 'over'], problems);
  problems.push(...sweptBandProblems(settings, over, [...path, 'over']));
  const claimed = parseClaimedList(raw, path, over, problems);
  const declared = declaredRoles(of, around.waveforms);
  problems.push(...variableProblems(quantity, declared, path), ...settingAgainstWaveforms(settings, over, declared, path));
  const rolesKnown = quantity.roles.every((role) => (quantity.optionalRoles ?? []).includes(role) || (declared[role]?.length ?? 0) > 0);
  if (rolesKnown) problems.push(...notRefused(missingSettings(quantity, settings, over, declared, path), raw.settings ?? {}, [...path, 'settings']));
  return { quantity, of, noise, settings, over, claimed };
}

/** Which waveforms and settings it may name hangs on the quantity; what is claimed does not. */
function withoutQuantity(raw: Partial<RawClaim>, path: readonly PropertyKey[], { catalogue }: Surroundings): Problem[] {
  const problems = raw.quantity === undefined ? [] : [unknownQuantity(raw.quantity, pointer(...path, 'quantity'), catalogue)];
  if (raw.over === undefined) parseClaimedList(raw, path, null, problems);
  return problems;
}

function unknownQuantity(id: string, where: string, catalogue: Catalogue): Problem {
  const known = [...catalogue.quantities.keys()];
  const hint = didYouMean(id, known);
  return { code: 'claims/unknown-name', where, saw: `the unknown quantity ${describe(id)}`, expected: `one of ${known.join(', ')}`, ...(hint ? { hint } : {}) };
}

/** "more than 0.98 at every mass" is one inequality for a whole sweep. */
const isBound = (claimed: unknown): boolean => typeof claimed === 'object' && claimed !== null && !Array.isArray(claimed) && ('above' in claimed || 'below' in claimed);

/**
 * One claimed entry a point: an array for a sweep, a single entry otherwise. A tolerance beside an
 * inequality is read and has no part in its verdict (settings.md section 1).
 */
function parseClaimedList(raw: Partial<RawClaim>, path: readonly PropertyKey[], over: Sweep | null, problems: Problem[]): Claimed[] {
  const at = [...path, 'claimed'];
  if (raw.claimed === undefined) return [];
  const swept = raw.over !== undefined;
  const listed = over ? raw.over?.[over.setting] : undefined;
  const points = Array.isArray(listed) ? listed.length : 0;
  const given = swept && isBound(raw.claimed) ? Array.from({ length: Math.max(1, points) }, () => raw.claimed) : raw.claimed;
  if (swept !== Array.isArray(given)) {
    problems.push({ code: 'claims/claimed', where: pointer(...at), saw: swept ? `one entry, ${describe(given)}` : `a list, ${describe(given)}`, expected: swept ? 'a list with one entry for each value of "over", or one inequality for them all' : 'one entry, as nothing is swept', ...(swept ? {} : { hint: 'Name the swept setting in "over".' }) });
    return [];
  }
  const entries: readonly unknown[] = Array.isArray(given) ? given : [given];
  if (points > 0 && entries.length !== points)
    problems.push({ code: 'claims/claimed', where: pointer(...at), saw: `${entries.length} claimed entr${entries.length === 1 ? 'y' : 'ies'}`, expected: `${points}, one for each value of "over"` });
  const claimed = entries.flatMap((entry, i) => {
    const parsed = parseClaimed(entry);
    if (parsed.ok) return [parsed.value];
    problems.push({ where: pointer(...at, ...(swept ? [i] : [])), ...parsed.error });
    return [];
  });
  return claimed;
}
