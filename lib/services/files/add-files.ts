import { storeFile, type UploadedFile } from '@/db/writes/files/store-file';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { AppFailure, fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import type { FileView } from '@/lib/services/submissions/submission-view';
import { LODGED_ALREADY } from '@/lib/services/submissions/update-draft';
import { currentRevision, mayAdd, roomFor } from './add-file';
import { discardStaged, MAX_FILES, stageFile, type Incoming } from './stage-file';

/** Hands over one file after the other; an error of `take` ends the walk. */
export type EachFile = (take: (file: Incoming) => Promise<void>) => Promise<void>;

/** The files of one request into a draft, all or none: what was told once is one act. */
export async function addFiles(actor: Actor, submissionId: string, eachFile: EachFile): Promise<Outcome<readonly FileView[]>> {
  const open = await mayAdd(actor, submissionId, null);
  if (!open.ok) return open;
  const staged: UploadedFile[] = [];
  let added: Outcome<readonly FileView[]> | null = null;
  try {
    await eachFile((file) => stageOne(actor, submissionId, staged, file));
    added = staged.length > 0 ? await recordFiles(actor, submissionId, staged) : fail('invalid', 'No file came with the request.');
  } catch (cause) {
    if (!(cause instanceof AppFailure)) throw cause;
    added = { ok: false, error: cause.error };
  } finally {
    await discardStaged(staged);
  }
  return added;
}

async function stageOne(actor: Actor, submissionId: string, staged: UploadedFile[], file: Incoming): Promise<void> {
  const room = await mayAdd(actor, submissionId, file.name);
  const one = !room.ok ? room : staged.length >= MAX_FILES ? fail('limit', `A submission holds at most ${MAX_FILES} files.`) : await stageFile(file);
  if (!one.ok) {
    file.stream.resume();
    throw new AppFailure(one.error);
  }
  staged.push(one.value);
}

const recordFiles = (actor: Actor, submissionId: string, files: readonly UploadedFile[]): Promise<Outcome<readonly FileView[]>> =>
  actOnSubmission({ actor, action: 'submission.edit', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    const row = await currentRevision(tx, submissionId);
    if (!row) return { ok: false, error: NOT_FOUND };
    const views: FileView[] = [];
    for (const file of files) {
      const room = await roomFor(tx, row, file.name);
      if (!room.ok) return room;
      const { id } = await storeFile(tx, grant, { submissionId, revisionId: row.id }, file);
      views.push({ id, name: file.name, bytes: file.bytes, sha256: file.sha256 });
    }
    note({ files: views.map(({ name, bytes, sha256 }) => ({ name, bytes, sha256 })) });
    return ok(views);
  });
