import { createSubmission } from '@/db/writes/submissions/create-submission';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actGenerally } from '@/lib/services/act';
import type { Outcome } from '@/lib/services/app-error';
import { EMPTY_SHEET } from './draft-sheet';

/** An empty draft; the composer opens on it. */
export function createDraft(actor: Actor, input: { readonly title?: string | undefined } = {}): Promise<Outcome<{ readonly id: string }>> {
  return actGenerally({ actor, action: 'submission.create' }, async ({ tx, grant, note }) => {
    const title = input.title?.trim() ?? '';
    const { submissionId } = await createSubmission(tx, grant, { title, statement: '', sheet: { ...EMPTY_SHEET, title } });
    note('submission', submissionId);
    return ok({ id: submissionId });
  });
}
