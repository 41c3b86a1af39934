import { z } from 'zod';
import { findVariation } from '@/db/reads/variations/variations';
import { recordSharing } from '@/db/writes/variations/record-variation';
import { ok } from '@/lib/kernel/result';
import { isUuid } from '@/lib/kernel/uuid';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { isOfDraft, isOwn, visibilityOf } from './sees-variation';
import type { VariationVisibility } from './variation-view';

export const linkInput = z.strictObject({ readable: z.boolean().describe('true: whoever has the link; false: no longer.') });

/** On a record, its owner lets whoever has the link read a variation, or shuts it again. What others copied meanwhile stays with them. */
export function openByLink(actor: Actor, submissionId: string, variationId: string, { readable }: z.output<typeof linkInput>): Promise<Outcome<{ readonly visibility: VariationVisibility }>> {
  return actOnSubmission({ actor, action: 'submission.share-variation', submissionId }, async ({ tx, grant, note }) => {
    const row = isUuid(variationId) ? await findVariation(tx, submissionId, variationId) : undefined;
    if (!row || !isOwn(actor, row)) return { ok: false, error: NOT_FOUND };
    if (isOfDraft(row)) return fail('precondition', 'This variation is of a draft and stays with its authors. Ask for it again on the record.');
    if (row.readable !== readable && !(await recordSharing(tx, grant, variationId, readable))) return { ok: false, error: NOT_FOUND };
    note({ variationId, readable });
    return ok({ visibility: visibilityOf({ ...row, readable }) });
  });
}
