import { eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { revisionFiles } from '@/db/schema/files';
import { revisions } from '@/db/schema/submissions';
import type { RevisionRow } from '@/db/reads/submissions/revision';
import type { SubmissionGrant } from '@/lib/policy/grant';
import { copyAnswers } from './answer-finding';
import { moveSubmission } from './move-submission';

/** The next number, begun as a copy of the last: text, sheet and files, which are the same stored bytes. */
export async function beginRevision(tx: Transaction, grant: SubmissionGrant<'submission.revise'>, last: RevisionRow): Promise<number | undefined> {
  const number = last.number + 1;
  const moved = await moveSubmission(tx, grant, { to: 'back-with-author', currentRevision: number });
  if (!moved) return undefined;
  const [begun] = await tx
    .insert(revisions)
    .values({ submissionId: grant.submissionId, number, title: last.title, statement: last.statement, sheet: last.sheet })
    .returning({ id: revisions.id });
  if (!begun) throw new Error('the database gave no row back');
  const files = await tx.select({ name: revisionFiles.name, fileId: revisionFiles.fileId }).from(revisionFiles).where(eq(revisionFiles.revisionId, last.id));
  if (files.length > 0) await tx.insert(revisionFiles).values(files.map((file) => ({ ...file, revisionId: begun.id })));
  await copyAnswers(tx, grant, last.id, begun.id);
  return number;
}
