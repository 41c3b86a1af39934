import type { Transaction } from '@/db/client';
import { listAuthorAddresses } from '@/db/reads/decisions/author-addresses';
import type { NewDecision } from '@/db/writes/decisions/record-decision';
import { isSignedIn, type Actor } from '@/lib/policy/actor';
import { appOrigin } from '@/lib/services/mail-outbox/app-origin';
import { decisionLetter } from '@/lib/services/mail-outbox/letters';
import { queueMail } from '@/lib/services/mail-outbox/queue-mail';
import type { LodgedResult } from '@/lib/services/reviews/official-result';

/** One letter to each author, in the transaction of the decision. */
export async function tellAuthors(tx: Transaction, actor: Actor, submissionId: string, official: LodgedResult, decision: NewDecision & { readonly decisionId: string }): Promise<void> {
  const editor = isSignedIn(actor) ? `${actor.name}, editor` : 'The editor';
  for (const author of await listAuthorAddresses(tx, submissionId)) {
    const letter = decisionLetter({
      name: author.name,
      title: official.title,
      revision: decision.revision,
      kind: decision.kind,
      editor,
      level: decision.level,
      covers: decision.covers,
      remarks: decision.remarks,
      ...decision.letter,
      url: `${appOrigin()}/review/${submissionId}`,
    });
    await queueMail(tx, author.email, `decision:${decision.decisionId}:${author.userId}`, letter);
  }
}
