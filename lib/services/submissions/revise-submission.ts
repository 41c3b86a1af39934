import { findRevision } from '@/db/reads/submissions/revision';
import { getSubmissionHead } from '@/db/reads/submissions/submission-head';
import { beginRevision } from '@/db/writes/submissions/begin-revision';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';

/** Begins the next revision as a copy of the last; the lodged one stands as it is. */
export function reviseSubmission(actor: Actor, submissionId: string): Promise<Outcome<{ readonly revision: number }>> {
  return actOnSubmission({ actor, action: 'submission.revise', submissionId }, async ({ tx, grant, facts, note }) => {
    if (!facts.currentLodged) return fail('conflict', 'The next revision is already begun. Go on with it in the composer.');
    const { currentRevision } = await getSubmissionHead(tx, submissionId);
    const last = await findRevision(tx, submissionId, currentRevision);
    if (!last) return { ok: false, error: NOT_FOUND };
    const revision = await beginRevision(tx, grant, last);
    if (revision === undefined) return fail('conflict', 'The submission has moved on meanwhile. Reload to see where it stands.');
    note({ revision });
    return ok({ revision });
  });
}
