import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { findingAnswers } from '@/db/schema/finding-answers';
import type { SubmissionGrant } from '@/lib/policy/grant';

export interface NamedFinding {
  readonly code: string;
  readonly where: string;
  readonly text: string;
}

/** Puts the answer in the place of an earlier one; an empty answer takes it back. */
export async function writeAnswer(tx: Transaction, _grant: SubmissionGrant<'submission.edit'>, revisionId: string, finding: NamedFinding, answer: string): Promise<void> {
  const { code, where: place, text } = finding;
  await tx
    .delete(findingAnswers)
    .where(and(eq(findingAnswers.revisionId, revisionId), eq(findingAnswers.code, code), eq(findingAnswers.place, place), eq(findingAnswers.finding, text)));
  if (answer !== '') await tx.insert(findingAnswers).values({ revisionId, code, place, finding: text, answer });
}

/** What was answered stays answered when the next revision begins, as long as the finding says the same. */
export async function copyAnswers(tx: Transaction, _grant: SubmissionGrant<'submission.revise'>, from: string, to: string): Promise<void> {
  const rows = await tx.select().from(findingAnswers).where(eq(findingAnswers.revisionId, from));
  if (rows.length > 0) await tx.insert(findingAnswers).values(rows.map((row) => ({ ...row, revisionId: to })));
}
