import { findStoredFile } from '@/db/reads/files/stored-file';
import { storeFile } from '@/db/writes/files/store-file';
import { pathFault } from '@/lib/claims/file-path';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import type { FileView } from '@/lib/services/submissions/submission-view';
import { LODGED_ALREADY } from '@/lib/services/submissions/update-draft';
import { currentRevision, roomFor } from './add-file';

/** Brings back a file that was taken out: its bytes never left, since a run may have read them. */
export function restoreFile(actor: Actor, submissionId: string, input: { readonly name: string; readonly fileId: string }): Promise<Outcome<FileView>> {
  return actOnSubmission({ actor, action: 'submission.edit', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    if (pathFault(input.name) !== null) return fail('invalid', 'This is no name for a file; expected a relative path such as data/a.txt.');
    const row = await currentRevision(tx, submissionId);
    const here = await findStoredFile(tx, submissionId, { fileId: input.fileId });
    if (!row || !here) return { ok: false, error: NOT_FOUND };
    const room = await roomFor(tx, row, input.name);
    if (!room.ok) return room;
    const { id } = await storeFile(tx, grant, { submissionId, revisionId: row.id }, { name: input.name, ...here });
    note({ restoredFile: input.name, sha256: here.sha256 });
    return ok({ id, name: input.name, bytes: here.bytes, sha256: here.sha256 });
  });
}
