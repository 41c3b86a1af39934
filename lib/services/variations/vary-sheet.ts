import type { VariationChanges } from '@/db/schema/variations';
import { ok } from '@/lib/kernel/result';
import { fail, type Outcome } from '@/lib/services/app-error';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';

type Claim = Readonly<Record<string, unknown>>;
const record = (value: unknown): Record<string, unknown> => (typeof value === 'object' && value !== null && !Array.isArray(value) ? { ...(value as object) } : {});

/** A name for the varied noise curve that the author has not used. */
function freeName(taken: DraftSheet['noise']): string {
  let name = 'varied';
  while (name in taken) name += '_';
  return name;
}

/**
 * The sheet of one claim at one point with the changes put in. Everything that is not changed stays
 * as the author declared it, defaults included.
 */
export function varySheet(sheet: DraftSheet, claimId: string, changes: VariationChanges): Outcome<DraftSheet> {
  const claim = sheet.claims.find((c) => c['id'] === claimId);
  if (!claim) return fail('invalid', `The sheet has no claim ${claimId}; it has ${sheet.claims.map((c) => String(c['id'])).join(', ')}.`);
  const noise = changedNoise(sheet, changes);
  if (!noise.ok) return noise;
  const varied = atOnePoint({ ...claim, settings: withBand(record(claim['settings']), changes) }, changes);
  return ok({ ...sheet, noise: noise.value.curves, claims: [noise.value.name === null ? varied : { ...varied, noise: noise.value.name }] });
}

const withBand = (settings: Record<string, unknown>, { fLowHz, fHighHz }: VariationChanges): Record<string, unknown> => ({
  ...settings,
  ...(fLowHz !== undefined && { fLowHz }),
  ...(fHighHz !== undefined && { fHighHz }),
});

function changedNoise(sheet: DraftSheet, { noise }: VariationChanges): Outcome<{ readonly curves: DraftSheet['noise']; readonly name: string | null }> {
  if (!noise) return ok({ curves: sheet.noise, name: null });
  if ('curve' in noise) {
    const name = freeName(sheet.noise);
    return ok({ curves: { ...sheet.noise, [name]: { curve: noise.curve } }, name });
  }
  if (!(noise.named in sheet.noise)) return fail('invalid', `The sheet has no noise ${noise.named}; it has ${Object.keys(sheet.noise).join(', ')}.`);
  return ok({ curves: sheet.noise, name: noise.named });
}

/** A mass given in the variation replaces a sweep over mass; the claimed value kept is that of the nearest claimed point. */
function atOnePoint(claim: Claim, { totalMassMsun }: VariationChanges): Claim {
  if (totalMassMsun === undefined) return claim;
  const { over, ...rest } = claim;
  const settings = { ...record(claim['settings']), totalMassMsun };
  const swept = record(over)['totalMassMsun'];
  if (!Array.isArray(swept) || !Array.isArray(claim['claimed'])) return { ...claim, settings };
  const nearest = swept.reduce<number>((best, mass, i) => (Math.abs(Number(mass) - totalMassMsun) < Math.abs(Number(swept[best]) - totalMassMsun) ? i : best), 0);
  return { ...rest, settings, claimed: (claim['claimed'] as unknown[])[nearest] };
}
