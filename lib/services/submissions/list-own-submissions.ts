import { database } from '@/db/client';
import { listOwnSubmissions as readOwn } from '@/db/reads/submissions/own-submissions';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { isEditableState } from '@/lib/policy/submission-state';
import { formatState } from '@/lib/reviews/states';
import type { Outcome } from '@/lib/services/app-error';
import type { SubmissionLine } from './submission-view';
import { dayOnly } from './view-parts';

/** What the one who asks wrote or wrote with others, the latest change first. */
export async function listOwnSubmissions(actor: Actor): Promise<Outcome<readonly SubmissionLine[]>> {
  const grant = mayGenerally('submission.list-own', actor);
  if (!grant.ok) return grant;
  const rows = await readOwn(database(), userIdOf(grant.value.actor) ?? '');
  return ok(
    rows.map((row) => ({
      ...row,
      stateWords: formatState(row.state, row.round),
      verdicts: (row.verdicts ?? []) as SubmissionLine['verdicts'],
      // Referees move a submission too: the hour would tell who was quick.
      updatedAt: isEditableState(row.state) ? row.updatedAt.toISOString() : dayOnly(row.updatedAt),
    })),
  );
}
