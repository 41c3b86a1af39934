import type { Transaction } from '@/db/client';
import { listNamesUnderWay, sumAnnouncedBytes } from '@/db/reads/files/uploads';
import { listRevisionFiles, type RevisionRow } from '@/db/reads/submissions/revision';
import type { AnnouncedFile } from '@/db/writes/files/uploads';
import { ok } from '@/lib/kernel/result';
import { userIdOf } from '@/lib/policy/actor';
import type { SubmissionGrant } from '@/lib/policy/grant';
import { fail, type Outcome } from '@/lib/services/app-error';
import { MAX_FILE_BYTES, MAX_FILES } from './stage-file';

/** Of what one person has announced and not finished, over all submissions: four of the longest files, 2 GiB. */
export const MAX_ANNOUNCED_BYTES = 4 * MAX_FILE_BYTES;

/** Asked before an upload is opened, since its parts take up room that no draft accounts for. */
export async function roomForUpload(tx: Transaction, grant: SubmissionGrant<'submission.edit'>, row: RevisionRow, file: AnnouncedFile): Promise<Outcome<null>> {
  const names = new Set([...(await listRevisionFiles(tx, row.id)).map((f) => f.name), ...(await listNamesUnderWay(tx, grant.submissionId))]);
  if (names.size >= MAX_FILES && !names.has(file.name))
    return fail('limit', `This submission has ${names.size} files, those on their way among them; it holds at most ${MAX_FILES}. Remove a file or let go of an upload first.`);
  const announced = await sumAnnouncedBytes(tx, userIdOf(grant.actor) ?? '');
  if (announced + file.bytes > MAX_ANNOUNCED_BYTES)
    return fail('limit', `Your unfinished uploads come to ${announced} bytes and ${file.name} would add ${file.bytes}; at most ${MAX_ANNOUNCED_BYTES} bytes may be on their way for one person. Finish an upload or let go of one first.`);
  return ok(null);
}
