import { database } from '@/db/client';
import { listInvitationsTo } from '@/db/reads/reviews/invitations';
import { listAuthors } from '@/db/reads/submissions/submission-head';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { addDays, CLOCK_DAYS } from '@/lib/reviews/clocks';
import { formatState } from '@/lib/reviews/states';
import type { Outcome } from '@/lib/services/app-error';
import type { OwnInvitationView } from './invitation-view';
import { findOfficialResult } from './official-result';

/** What the reader was asked to referee, and what they referee. */
export async function listOwnInvitations(actor: Actor): Promise<Outcome<readonly OwnInvitationView[]>> {
  const grant = mayGenerally('review.list-own', actor);
  if (!grant.ok) return grant;
  const reader = database();
  const views: OwnInvitationView[] = [];
  const rows = await listInvitationsTo(reader, userIdOf(actor) ?? '');
  // Who declined or was relieved follows the submission no further.
  for (const row of rows.filter((r) => r.state === 'asked' || r.state === 'accepted')) {
    const official = await findOfficialResult(reader, row.submissionId);
    const authors = await listAuthors(reader, row.submissionId);
    views.push({
      id: row.id,
      submissionId: row.submissionId,
      title: official?.title ?? row.title,
      authors: authors.map((a) => a.name),
      quantities: [...new Set((official?.result?.claims ?? []).map((c) => c.quantity))],
      editor: row.editor,
      invitedAt: row.invitedAt.toISOString(),
      answerBy: addDays(row.invitedAt.toISOString(), CLOCK_DAYS.invitation),
      state: row.state,
      submissionState: row.submissionState,
      stateWords: formatState(row.submissionState, row.round),
    });
  }
  return ok(views);
}
