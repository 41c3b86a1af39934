import { randomUUID } from 'node:crypto';
import type { Readable } from 'node:stream';
import { database } from '@/db/client';
import { findUpload } from '@/db/reads/files/uploads';
import { keepPart } from '@/db/writes/files/uploads';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';
import { LODGED_ALREADY } from '@/lib/services/submissions/update-draft';
import { SizeDiffers } from '@/lib/storage/object-store';
import { mayAdd } from './add-file';
import { fileStore } from './file-store';
import { partsOf, sizeOfPart } from './upload-view';

export const UPLOAD_GONE = fail('not-found', 'This upload is over, or was let go. Send the file again.');

/** One part into the store. It counts only when it has come in full. */
export async function takePart(actor: Actor, submissionId: string, at: { readonly uploadId: string; readonly number: number }, stream: Readable): Promise<Outcome<{ readonly number: number }>> {
  const open = await mayAdd(actor, submissionId, null);
  const upload = open.ok ? await findUpload(database(), submissionId, userIdOf(actor) ?? '', at.uploadId) : undefined;
  if (!open.ok || !upload || at.number >= partsOf(upload.bytes)) {
    stream.resume();
    return open.ok ? UPLOAD_GONE : open;
  }
  const storageKey = `parts/${upload.id}/${randomUUID()}`;
  const fault = await arrive(storageKey, stream, sizeOfPart(upload.bytes, at.number));
  if (fault) return fault;
  const kept = await recordPart(actor, submissionId, { ...at, storageKey });
  const over = kept.ok ? kept.value.replaced : storageKey;
  if (over !== undefined) await fileStore().remove(over);
  return kept.ok ? ok({ number: at.number }) : kept;
}

async function arrive(key: string, stream: Readable, size: number) {
  try {
    await fileStore().put(key, stream, { size });
    return null;
  } catch (error) {
    stream.resume();
    if (error instanceof SizeDiffers) return fail('invalid', `${error.saw} bytes of this part arrived; expected ${error.declared}. Send the part again.`);
    if (error instanceof Error && /aborted|terminated|premature close|ECONNRESET/i.test(error.message)) return fail('invalid', 'The part ended early: the connection broke. Send it again.');
    throw error;
  }
}

const recordPart = (actor: Actor, submissionId: string, part: { readonly uploadId: string; readonly number: number; readonly storageKey: string }) =>
  actOnSubmission({ actor, action: 'submission.edit', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    if (!(await findUpload(tx, submissionId, userIdOf(actor) ?? '', part.uploadId))) return UPLOAD_GONE;
    const replaced = await keepPart(tx, grant, part);
    note({ uploadPart: part.number, upload: part.uploadId });
    return ok({ replaced });
  });
