import type { Reader } from '@/db/client';
import { listInvitations, type InvitationRow } from '@/db/reads/reviews/invitations';
import { listReports } from '@/db/reads/reviews/reports';
import { getSubmissionHead } from '@/db/reads/submissions/submission-head';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { addDays, reportDays } from '@/lib/reviews/clocks';
import type { InvitationView } from './invitation-view';

/** Who was asked, and where their report stands. `onlyFor` one referee, else everybody: then for the editor alone. */
export async function viewInvitations(reader: Reader, facts: SubmissionFacts, onlyFor?: string): Promise<readonly InvitationView[]> {
  const rows = (await listInvitations(reader, facts.submissionId)).filter((row) => onlyFor === undefined || row.refereeId === onlyFor);
  const reported = new Set((await listReports(reader, facts.submissionId)).filter((r) => r.round === facts.round).map((r) => r.refereeId));
  const { stateChangedAt } = await getSubmissionHead(reader, facts.submissionId);
  return rows.map((row) => view(row, reported.has(row.refereeId), reportDue(row, facts, stateChangedAt)));
}

/** From the beginning of the round, or from the day of joining for who joined later. */
function reportDue(row: InvitationRow, facts: SubmissionFacts, roundSince: Date): string | null {
  if (row.state !== 'accepted' || facts.state !== 'in-review') return null;
  const since = row.answeredAt && row.answeredAt > roundSince ? row.answeredAt : roundSince;
  return addDays(since.toISOString(), reportDays(facts.round));
}

const view = (row: InvitationRow, hasReported: boolean, due: string | null): InvitationView => ({
  id: row.id,
  name: row.name,
  email: row.email,
  affiliation: row.affiliation,
  slot: row.slot,
  state: row.state,
  invitedAt: row.invitedAt.toISOString(),
  answeredAt: row.answeredAt?.toISOString() ?? null,
  reportDue: due,
  hasReported,
  flags: row.flags,
  reason: row.reason,
});
