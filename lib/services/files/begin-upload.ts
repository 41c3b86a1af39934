import type { Transaction } from '@/db/client';
import { findStoredFile } from '@/db/reads/files/stored-file';
import { findUploadNamed, listUploadParts } from '@/db/reads/files/uploads';
import type { RevisionRow } from '@/db/reads/submissions/revision';
import { storeFile } from '@/db/writes/files/store-file';
import { dropUpload, keepUploadLonger, openUpload, queueAnnouncements, type AnnouncedFile } from '@/db/writes/files/uploads';
import { pathFault } from '@/lib/claims/file-path';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import type { SubmissionGrant } from '@/lib/policy/grant';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import type { FileView } from '@/lib/services/submissions/submission-view';
import { LODGED_ALREADY } from '@/lib/services/submissions/update-draft';
import { currentRevision, roomFor } from './add-file';
import { fileStore } from './file-store';
import { roomForUpload } from './upload-room';
import { PART_BYTES, type UploadView } from './upload-view';

/** Either the bytes are here already, under whatever name, or this is what is still wanted. */
export type BegunUpload = { readonly file: FileView; readonly upload: null } | { readonly file: null; readonly upload: UploadView };

/** Announces a long file. The same file announced again goes on where it broke off; another of the same name takes its place. */
export async function beginUpload(actor: Actor, submissionId: string, file: AnnouncedFile): Promise<Outcome<BegunUpload>> {
  const replaced: string[] = [];
  const begun = await actOnSubmission<'submission.edit', BegunUpload>({ actor, action: 'submission.edit', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    const fault = pathFault(file.name);
    if (fault !== null) return fail('invalid', `The file has ${fault} for a name; expected a relative path such as data/a.txt. Rename it.`);
    const row = await currentRevision(tx, submissionId);
    if (!row) return { ok: false, error: NOT_FOUND };
    const room = await roomFor(tx, row, file.name);
    if (!room.ok) return room;
    const here = await findStoredFile(tx, submissionId, { sha256: file.sha256 });
    if (here) {
      const { id } = await storeFile(tx, grant, { submissionId, revisionId: row.id }, { name: file.name, ...here });
      note({ file: file.name, sha256: here.sha256, bytes: here.bytes, alreadyHere: true });
      return ok({ file: { id, name: file.name, bytes: here.bytes, sha256: here.sha256 }, upload: null });
    }
    note({ uploadBegun: file.name, bytes: file.bytes });
    const upload = await goOn(tx, grant, { row, file, replaced });
    return upload.ok ? ok({ file: null, upload: upload.value }) : upload;
  });
  if (begun.ok) for (const key of replaced) await fileStore().remove(key);
  return begun;
}

interface Announced {
  readonly row: RevisionRow;
  readonly file: AnnouncedFile;
  /** Keys of parts that are not wanted any more, for whoever sees the transaction through. */
  readonly replaced: string[];
}

async function goOn(tx: Transaction, grant: SubmissionGrant<'submission.edit'>, { row, file, replaced }: Announced): Promise<Outcome<UploadView>> {
  await queueAnnouncements(tx, grant);
  const same = await findUploadNamed(tx, grant.submissionId, userIdOf(grant.actor) ?? '', file.name);
  const parts = same ? await listUploadParts(tx, same.id) : [];
  // One whose time is over may be losing its parts to the worker at this moment.
  if (same && !same.over && same.sha256 === file.sha256 && same.bytes === file.bytes) {
    await keepUploadLonger(tx, grant, same.id);
    return ok({ id: same.id, ...file, partBytes: PART_BYTES, arrived: parts.map(({ number }) => number) });
  }
  if (same) {
    replaced.push(...parts.map(({ storageKey }) => storageKey));
    await dropUpload(tx, grant, same.id);
  }
  const room = await roomForUpload(tx, grant, row, file);
  return room.ok ? ok({ id: await openUpload(tx, grant, file), ...file, partBytes: PART_BYTES, arrived: [] }) : room;
}
