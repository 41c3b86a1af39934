import type { VariationChanges } from '@/db/schema/variations';
import { parseClaimSheet } from '@/lib/claims/parse-sheet';
import type { Problem } from '@/lib/kernel/problem';
import { ok } from '@/lib/kernel/result';
import { catalogue } from '@/lib/pipeline/catalogue';
import { fail, type Outcome } from '@/lib/services/app-error';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';

/** Readings and masks stand beside a sheet; it cannot say them. */
type SheetChanges = Pick<VariationChanges, 'settings' | 'noise'>;
type Claim = Readonly<Record<string, unknown>>;
const record = (value: unknown): Record<string, unknown> => (typeof value === 'object' && value !== null && !Array.isArray(value) ? { ...(value as object) } : {});

/** A name for the varied noise curve that the author has not used. */
function freeName(taken: DraftSheet['noise']): string {
  let name = 'varied';
  while (name in taken) name += '_';
  return name;
}

/**
 * The sheet of one claim with the changes put in. Everything that is not changed stays as the author
 * declared it, defaults included.
 */
export function varySheet(sheet: DraftSheet, claimId: string, changes: SheetChanges): Outcome<DraftSheet> {
  const claim = sheet.claims.find((c) => c['id'] === claimId);
  if (!claim) return fail('invalid', `The sheet has no claim ${claimId}; it has ${sheet.claims.map((c) => String(c['id'])).join(', ')}.`);
  const noise = changedNoise(sheet, changes);
  if (!noise.ok) return noise;
  const varied = withSettings(claim, changes.settings ?? {});
  if (!varied.ok) return varied;
  return ok({ ...sheet, noise: noise.value.curves, claims: [noise.value.name === null ? varied.value : { ...varied.value, noise: noise.value.name }] });
}

/** The varied sheet, if it can be read as one; else every problem, at the place in the changes that made it or in the sheet. */
export function readable(varied: DraftSheet, changes: SheetChanges, sheet: DraftSheet): Outcome<DraftSheet> {
  const parsed = parseClaimSheet(varied as unknown, catalogue);
  if (parsed.ok) return ok(varied);
  const index = sheet.claims.findIndex((claim) => claim['id'] === varied.claims[0]?.['id']);
  return fail('invalid', 'With these changes the claim cannot be read.', parsed.error.map((problem) => ({ ...problem, where: placeIn(problem, changes, index) })));
}

function placeIn({ where }: Problem, { settings = {} }: SheetChanges, index: number): string {
  const name = /^\/claims\/0\/(?:settings|over)\/([^/]+)/.exec(where)?.[1];
  if (name !== undefined && name in settings) return where.replace(/^\/claims\/0\/(?:settings|over)/, '/changes/settings');
  return where.startsWith('/noise/varied') ? '/changes/noise' : where.replace(/^\/claims\/0/, `/claims/${index}`);
}

function withSettings(claim: Claim, changed: Readonly<Record<string, unknown>>): Outcome<Claim> {
  const declared = record(claim['settings']);
  const undeclared = Object.keys(changed).filter((name) => changed[name] === null && !(name in declared));
  if (undeclared.length > 0)
    return fail('invalid', 'Only what the claim declares can be taken away.', undeclared.map((name) => ({ code: 'variations/not-declared', where: `/changes/settings/${name}`, saw: 'null', expected: `a value: the claim declares ${Object.keys(declared).join(', ') || 'no setting'}` })));
  const settings = Object.fromEntries(Object.entries({ ...declared, ...changed }).filter(([, value]) => value !== null));
  return ok(atOnePoint({ ...claim, settings }));
}

function changedNoise(sheet: DraftSheet, { noise }: SheetChanges): Outcome<{ readonly curves: DraftSheet['noise']; readonly name: string | null }> {
  if (!noise) return ok({ curves: sheet.noise, name: null });
  if ('curve' in noise) {
    const name = freeName(sheet.noise);
    return ok({ curves: { ...sheet.noise, [name]: { curve: noise.curve } }, name });
  }
  if (!(noise.named in sheet.noise)) return fail('invalid', `The sheet has no noise ${noise.named}; it has ${Object.keys(sheet.noise).join(', ')}.`);
  return ok({ curves: sheet.noise, name: noise.named });
}

/** The number by which a value of a sweep is told from another: itself, or the one number of a place. */
const sweptBy = (value: unknown): number => (typeof value === 'number' ? value : Number(Object.values(record(value))[0]));

/** A value given for the swept setting replaces the sweep; the claimed value kept is that of the nearest claimed point. */
function atOnePoint(claim: Claim): Claim {
  const { over, ...rest } = claim;
  const [swept] = Object.keys(record(over));
  const settings = record(claim['settings']);
  if (swept === undefined || !(swept in settings)) return claim;
  const values = record(over)[swept];
  if (!Array.isArray(values) || !Array.isArray(claim['claimed'])) return rest;
  const away = (value: unknown): number => Math.abs(sweptBy(value) - sweptBy(settings[swept]));
  const nearest = values.reduce<number>((best, value, i) => (away(value) < away(values[best]) ? i : best), 0);
  return { ...rest, claimed: (claim['claimed'] as unknown[])[nearest] };
}
