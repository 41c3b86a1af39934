import { dropFile } from '@/db/writes/files/store-file';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { namesVersion, versionMoved } from '@/lib/services/submissions/submission-tag';
import { LODGED_ALREADY } from '@/lib/services/submissions/update-draft';
import { currentRevision } from './add-file';

/** Takes a file out of the draft under the name the sheet gives it. */
export function removeFile(actor: Actor, submissionId: string, input: { readonly name: string }, ifMatch: readonly string[] | null = null): Promise<Outcome<null>> {
  return actOnSubmission({ actor, action: 'submission.edit', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    const row = await currentRevision(tx, submissionId);
    if (row && ifMatch && !namesVersion(ifMatch, row)) return fail('precondition', versionMoved(row));
    if (!row || !(await dropFile(tx, grant, row.id, input.name))) return { ok: false, error: NOT_FOUND };
    note({ removedFile: input.name });
    return ok(null);
  });
}
