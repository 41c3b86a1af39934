import { Readable } from 'node:stream';
import { database } from '@/db/client';
import { findUpload, listUploadParts, listUploads, type UploadRow } from '@/db/reads/files/uploads';
import type { UploadedFile } from '@/db/writes/files/store-file';
import { dropUpload } from '@/db/writes/files/uploads';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { actOnSubmission, readSubmission } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';
import { withoutKey } from '@/lib/services/once';
import type { FileView } from '@/lib/services/submissions/submission-view';
import { ObjectMissing } from '@/lib/storage/object-store';
import { mayAdd, recordFile } from './add-file';
import { fileStore } from './file-store';
import { discardStaged, stageFile } from './stage-file';
import { UPLOAD_GONE } from './take-part';
import { partsOf, viewUpload, type UploadView } from './upload-view';

interface Part {
  readonly number: number;
  readonly storageKey: string;
}

const ENDED_MEANWHILE = fail('conflict', 'This upload ended while its parts were put together: another request finished it or let it go. See whether the file is in the draft; if it is not, send it again.');

/** Puts the parts together, hashes the whole again, and gives the file its name; only then are the parts let go. */
export async function finishUpload(actor: Actor, submissionId: string, uploadId: string): Promise<Outcome<FileView>> {
  const open = await mayAdd(actor, submissionId, null);
  if (!open.ok) return open;
  const upload = await findUpload(database(), submissionId, userIdOf(actor) ?? '', uploadId);
  if (!upload) return UPLOAD_GONE;
  const room = await mayAdd(actor, submissionId, upload.name);
  if (!room.ok) return room;
  const parts = await listUploadParts(database(), uploadId);
  const wanting = partsOf(upload.bytes) - parts.length;
  if (wanting > 0) return fail('precondition', `${wanting} of ${partsOf(upload.bytes)} parts of ${upload.name} are not here yet. Send them first.`);
  const staged = await putTogether(actor, upload, parts);
  if (!staged.ok) return staged;
  if (staged.value.sha256 !== upload.sha256) {
    await discardStaged([staged.value]);
    await withoutKey(() => letGoOfUpload(actor, submissionId, uploadId));
    return fail('invalid', `${upload.name} arrived with the SHA-256 ${staged.value.sha256}; expected ${upload.sha256}. Nothing of it was kept; send it again.`);
  }
  // Listed again: a part that was sent once more while the first was read goes too.
  const done: Part[] = [];
  const recorded = await recordFile(actor, submissionId, staged.value, async (tx, grant) => {
    done.push(...(await listUploadParts(tx, uploadId)));
    return (await dropUpload(tx, grant, uploadId)) ? ok(null) : ENDED_MEANWHILE;
  });
  await discardStaged([staged.value]);
  if (recorded.ok) await letGoOfBytes(done);
  return recorded;
}

async function putTogether(actor: Actor, upload: UploadRow, parts: readonly Part[]): Promise<Outcome<UploadedFile>> {
  try {
    return await stageFile({ name: upload.name, stream: Readable.from(inOrder(parts)) });
  } catch (cause) {
    if (!(cause instanceof ObjectMissing)) throw cause;
    const now = await listUploadParts(database(), upload.id);
    const sentAgain = now.some(({ storageKey }) => !parts.some((part) => part.storageKey === storageKey));
    if (sentAgain) return fail('conflict', `A part of ${upload.name} was sent again while the parts were put together. Finish the upload again.`);
    // Rows without their bytes would refuse every further attempt; mostly they are gone already.
    await withoutKey(() => letGoOfUpload(actor, upload.submissionId, upload.id));
    return ENDED_MEANWHILE;
  }
}

async function* inOrder(parts: readonly Part[]): AsyncGenerator<Buffer> {
  for (const { storageKey } of parts) for await (const chunk of await fileStore().get(storageKey)) yield chunk as Buffer;
}

async function letGoOfBytes(parts: readonly Part[]): Promise<void> {
  for (const { storageKey } of parts) await fileStore().remove(storageKey);
}

/** Its sender no longer wants it. */
export async function letGoOfUpload(actor: Actor, submissionId: string, uploadId: string): Promise<Outcome<null>> {
  const parts: Part[] = [];
  const gone = await actOnSubmission({ actor, action: 'submission.edit', submissionId }, async ({ tx, grant, note }) => {
    const upload = await findUpload(tx, submissionId, userIdOf(actor) ?? '', uploadId);
    if (!upload) return UPLOAD_GONE;
    parts.push(...(await listUploadParts(tx, uploadId)));
    await dropUpload(tx, grant, uploadId);
    note({ uploadLetGo: upload.name });
    return ok(null);
  });
  if (gone.ok) await letGoOfBytes(parts);
  return gone;
}

/** One's own uploads that broke off, for the composer to offer going on. */
export const listOpenUploads = (actor: Actor, submissionId: string): Promise<Outcome<readonly UploadView[]>> =>
  readSubmission({ actor, action: 'submission.view-draft', submissionId }, async ({ reader }) =>
    ok(await Promise.all((await listUploads(reader, submissionId, userIdOf(actor) ?? '')).map((row) => viewUpload(reader, row)))),
  );
