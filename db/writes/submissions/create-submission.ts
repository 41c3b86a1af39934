import type { Transaction } from '@/db/client';
import { revisions, submissionPeople, submissions } from '@/db/schema/submissions';
import { userIdOf } from '@/lib/policy/actor';
import type { Grant } from '@/lib/policy/grant';

export interface NewSubmission {
  readonly title: string;
  readonly statement: string;
  readonly sheet: unknown;
}

/** A draft with its first revision and its author. */
export async function createSubmission(tx: Transaction, grant: Grant<'submission.create'>, draft: NewSubmission) {
  const userId = userIdOf(grant.actor);
  if (userId === null) throw new Error('a submission needs an author');
  const [submission] = await tx.insert(submissions).values({ title: draft.title, ownerId: userId }).returning({ id: submissions.id });
  if (!submission) throw new Error('the database gave no row back');
  const [revision] = await tx.insert(revisions).values({ submissionId: submission.id, number: 1, ...draft }).returning({ id: revisions.id });
  if (!revision) throw new Error('the database gave no row back');
  await tx.insert(submissionPeople).values({ submissionId: submission.id, userId, role: 'author', position: 1, confirmedAt: new Date() });
  return { submissionId: submission.id, revisionId: revision.id };
}
