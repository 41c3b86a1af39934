import { database, type Reader, type Transaction } from '@/db/client';
import { findSubmissionFacts } from '@/db/reads/submissions/submission-facts';
import { findRevision, listRevisionFiles, type RevisionRow } from '@/db/reads/submissions/revision';
import { getSubmissionHead } from '@/db/reads/submissions/submission-head';
import { storeFile, type UploadedFile } from '@/db/writes/files/store-file';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { may, type SubmissionGrant } from '@/lib/policy/grant';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import type { FileView } from '@/lib/services/submissions/submission-view';
import { LODGED_ALREADY } from '@/lib/services/submissions/update-draft';
import { discardStaged, MAX_FILES, stageFile, type Incoming } from './stage-file';

/** Streams a file into the draft. Asked twice: before the bytes are taken, and again in the transaction that records them. */
export async function addFile(actor: Actor, submissionId: string, incoming: Incoming): Promise<Outcome<FileView>> {
  const open = await mayAdd(actor, submissionId, incoming.name);
  if (!open.ok) {
    incoming.stream.resume();
    return open;
  }
  const staged = await stageFile(incoming);
  if (!staged.ok) return staged;
  const recorded = await recordFile(actor, submissionId, staged.value);
  await discardStaged([staged.value]);
  return recorded;
}

/** The answer to an upload before a byte of it is read. With no name known yet, whether there is room is asked later: the file may replace another. */
export async function mayAdd(actor: Actor, submissionId: string, name: string | null): Promise<Outcome<null>> {
  const facts = await findSubmissionFacts(database(), actor, submissionId);
  const grant = may('submission.edit', actor, facts);
  if (!grant.ok) return grant;
  if (facts?.currentLodged) return fail('conflict', LODGED_ALREADY);
  const row = await currentRevision(database(), submissionId);
  if (!row) return { ok: false, error: NOT_FOUND };
  return name === null ? ok(null) : roomFor(database(), row, name);
}

export async function roomFor(reader: Reader, row: RevisionRow, name: string): Promise<Outcome<null>> {
  const files = await listRevisionFiles(reader, row.id);
  const clash = files.find((f) => f.name !== name && f.name.normalize('NFC').toLowerCase() === name.normalize('NFC').toLowerCase());
  if (clash) return fail('invalid', `${name} and ${clash.name} differ in letter case alone, which some computers cannot keep apart. Rename one.`);
  if (files.length >= MAX_FILES && !files.some((f) => f.name === name)) return fail('limit', `A submission holds at most ${MAX_FILES} files. Remove one first.`);
  return ok(null);
}

/** `also` is written in the same transaction, and its refusal undoes all of it. */
export const recordFile = (actor: Actor, submissionId: string, file: UploadedFile, also: (tx: Transaction, grant: SubmissionGrant<'submission.edit'>) => Promise<Outcome<null>> = async () => ok(null)): Promise<Outcome<FileView>> =>
  actOnSubmission({ actor, action: 'submission.edit', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    const row = await currentRevision(tx, submissionId);
    if (!row) return { ok: false, error: NOT_FOUND };
    const room = await roomFor(tx, row, file.name);
    if (!room.ok) return room;
    const { id } = await storeFile(tx, grant, { submissionId, revisionId: row.id }, file);
    const more = await also(tx, grant);
    if (!more.ok) return more;
    note({ file: file.name, sha256: file.sha256, bytes: file.bytes });
    return ok({ id, name: file.name, bytes: file.bytes, sha256: file.sha256 });
  });

export async function currentRevision(reader: Reader, submissionId: string): Promise<RevisionRow | undefined> {
  const head = await getSubmissionHead(reader, submissionId);
  return findRevision(reader, submissionId, head.currentRevision);
}
