import { and, eq, sql } from 'drizzle-orm';
import type { Database, Transaction } from '@/db/client';
import { uploadParts, uploads } from '@/db/schema/uploads';
import { userIdOf } from '@/lib/policy/actor';
import type { SubmissionGrant } from '@/lib/policy/grant';

type MayUpload = SubmissionGrant<'submission.edit'>;

export interface AnnouncedFile {
  readonly name: string;
  readonly bytes: number;
  readonly sha256: string;
}

/** Long enough for a weekend without a connection. */
const kept = sql`now() + interval '3 days'`;

/** One person's announcements one after the other, also to several submissions, so that their sum can be trusted. */
export async function queueAnnouncements(tx: Transaction, grant: MayUpload): Promise<void> {
  await tx.execute(sql`select pg_advisory_xact_lock(hashtext(${`uploads of ${userIdOf(grant.actor) ?? ''}`}))`);
}

export async function openUpload(tx: Transaction, grant: MayUpload, file: AnnouncedFile): Promise<string> {
  const userId = userIdOf(grant.actor);
  if (userId === null) throw new Error('an upload needs somebody who sends it');
  const [made] = await tx.insert(uploads).values({ submissionId: grant.submissionId, userId, ...file, expiresAt: kept }).returning({ id: uploads.id });
  if (!made) throw new Error('the database gave no row back');
  return made.id;
}

export async function keepUploadLonger(tx: Transaction, _grant: MayUpload, uploadId: string): Promise<void> {
  await tx.update(uploads).set({ expiresAt: kept }).where(eq(uploads.id, uploadId));
}

/** The same part again takes the place of the first, whose key comes back to be let go. */
export async function keepPart(tx: Transaction, _grant: MayUpload, part: { readonly uploadId: string; readonly number: number; readonly storageKey: string }): Promise<string | undefined> {
  const [gone] = await tx
    .delete(uploadParts)
    .where(and(eq(uploadParts.uploadId, part.uploadId), eq(uploadParts.number, part.number)))
    .returning({ storageKey: uploadParts.storageKey });
  await tx.insert(uploadParts).values(part);
  return gone?.storageKey;
}

/** With its parts' rows; the bytes are let go by whoever asked. */
export async function dropUpload(tx: Transaction, _grant: MayUpload, uploadId: string): Promise<boolean> {
  return (await tx.delete(uploads).where(eq(uploads.id, uploadId)).returning({ id: uploads.id })).length === 1;
}

/** Takes no Grant: the worker clears away what is over, and the time is asked again here. */
export async function clearOverdueUpload(database: Database, uploadId: string): Promise<void> {
  await database.delete(uploads).where(and(eq(uploads.id, uploadId), sql`${uploads.expiresAt} < now()`));
}
