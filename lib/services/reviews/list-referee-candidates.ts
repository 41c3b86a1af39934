import { countOpenReviews, listPossibleReferees } from '@/db/reads/reviews/invitations';
import { findConflictFacts } from '@/db/reads/reviews/conflict-facts';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { findConflicts, isBarred } from '@/lib/reviews/conflicts';
import { readSubmission } from '@/lib/services/act';
import type { Outcome } from '@/lib/services/app-error';
import type { RefereeCandidateView } from './invitation-view';

/** Whom the editor might ask: those without a flag first, then by load. */
export function listRefereeCandidates(actor: Actor, submissionId: string): Promise<Outcome<readonly RefereeCandidateView[]>> {
  return readSubmission({ actor, action: 'review.see-identities', submissionId }, async ({ reader }) => {
    const people = await listPossibleReferees(reader, submissionId);
    const loads = await countOpenReviews(reader);
    const views: RefereeCandidateView[] = [];
    for (const person of people) {
      const facts = await findConflictFacts(reader, submissionId, { userId: person.id, email: person.email });
      views.push({ userId: person.id, name: person.name, affiliation: person.affiliation, flags: findConflicts(facts), load: loads.get(person.id) ?? 0 });
    }
    return ok(views.sort((a, b) => weight(a) - weight(b) || a.load - b.load || a.name.localeCompare(b.name, 'en-GB')));
  });
}

const weight = ({ flags }: RefereeCandidateView): number => (isBarred(flags) ? 3 : flags.some((f) => f.level === 'ask') ? 2 : flags.length > 0 ? 1 : 0);
