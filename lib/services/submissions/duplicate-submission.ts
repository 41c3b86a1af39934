import { z } from 'zod';
import { findRevision, listRevisionFiles } from '@/db/reads/submissions/revision';
import { getSubmissionHead } from '@/db/reads/submissions/submission-head';
import { storeFile } from '@/db/writes/files/store-file';
import { createSubmission } from '@/db/writes/submissions/create-submission';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { actGenerally, readSubmission } from '@/lib/services/act';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { asDraftSheet } from './draft-sheet';

export const duplicateInput = z.strictObject({
  /** An earlier revision; the current one unless said. */
  revision: z.int().min(1).optional(),
});

const LONGEST_TITLE = 300;

/**
 * A new draft of one's own from something one wrote: sheet, statement and files, which are the same
 * stored bytes and are not sent again. Needs both rights: to see what is copied as its author, and to
 * begin a submission. Co-authors, runs and threads stay where they are.
 */
export async function duplicateSubmission(actor: Actor, submissionId: string, { revision }: z.infer<typeof duplicateInput>): Promise<Outcome<{ readonly id: string }>> {
  // Asked first, so that somebody signed out is told so, and not that there is nothing here.
  const right = mayGenerally('submission.create', actor);
  if (!right.ok) return right;
  const source = await readSubmission({ actor, action: 'submission.view-draft', submissionId }, async ({ reader }) => {
    const { currentRevision } = await getSubmissionHead(reader, submissionId);
    const row = await findRevision(reader, submissionId, revision ?? currentRevision);
    return row ? ok({ row, files: await listRevisionFiles(reader, row.id) }) : { ok: false, error: NOT_FOUND };
  });
  if (!source.ok) return source;
  const { row, files } = source.value;
  return actGenerally({ actor, action: 'submission.create' }, async ({ tx, grant, note }) => {
    const words = { title: `Copy of ${row.title || 'an untitled draft'}`.slice(0, LONGEST_TITLE), statement: row.statement };
    const made = await createSubmission(tx, grant, { ...words, sheet: asDraftSheet(row.sheet, words) });
    for (const { name, sha256, bytes, storageKey } of files) await storeFile(tx, grant, made, { name, sha256, bytes, storageKey });
    note('submission', made.submissionId, { copyOf: submissionId, revision: row.number, files: files.length });
    return ok({ id: made.submissionId });
  });
}
