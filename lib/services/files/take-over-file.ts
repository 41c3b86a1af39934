import { z } from 'zod';
import { findStoredFile } from '@/db/reads/files/stored-file';
import { storeFile } from '@/db/writes/files/store-file';
import { pathFault } from '@/lib/claims/file-path';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission, readSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import type { FileView } from '@/lib/services/submissions/submission-view';
import { LODGED_ALREADY } from '@/lib/services/submissions/update-draft';
import { currentRevision, roomFor } from './add-file';

export const takeOverInput = z.strictObject({ submissionId: z.uuid({ version: 'v4' }), fileId: z.uuid({ version: 'v4' }), name: z.string().min(1).max(300) });

/** A file of another submission that one wrote, under a name in this draft: the same bytes, sent no second time. */
export async function takeOverFile(actor: Actor, draftId: string, from: z.infer<typeof takeOverInput>): Promise<Outcome<FileView>> {
  const there = await readSubmission({ actor, action: 'submission.view-draft', submissionId: from.submissionId }, async ({ reader }) => {
    const file = await findStoredFile(reader, from.submissionId, { fileId: from.fileId });
    return file ? ok(file) : { ok: false, error: NOT_FOUND };
  });
  if (!there.ok) return there;
  if (pathFault(from.name) !== null) return fail('invalid', 'This is no name for a file; expected a relative path such as data/a.txt.');
  return actOnSubmission({ actor, action: 'submission.edit', submissionId: draftId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    const row = await currentRevision(tx, draftId);
    if (!row) return { ok: false, error: NOT_FOUND };
    const room = await roomFor(tx, row, from.name);
    if (!room.ok) return room;
    const { id } = await storeFile(tx, grant, { submissionId: draftId, revisionId: row.id }, { name: from.name, ...there.value });
    note({ file: from.name, sha256: there.value.sha256, from: from.submissionId });
    return ok({ id, name: from.name, bytes: there.value.bytes, sha256: there.value.sha256 });
  });
}
