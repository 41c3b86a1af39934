import { and, asc, eq, gt, lt, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { uploadParts, uploads } from '@/db/schema/uploads';

export type UploadRow = typeof uploads.$inferSelect;

const alive = gt(uploads.expiresAt, sql`now()`);

/** One person's own uploads to a submission that are not over yet. */
export const listUploads = (reader: Reader, submissionId: string, userId: string): Promise<UploadRow[]> =>
  reader.select().from(uploads).where(and(eq(uploads.submissionId, submissionId), eq(uploads.userId, userId), alive)).orderBy(asc(uploads.name));

export async function findUpload(reader: Reader, submissionId: string, userId: string, uploadId: string): Promise<UploadRow | undefined> {
  const [row] = await reader.select().from(uploads).where(and(eq(uploads.id, uploadId), eq(uploads.submissionId, submissionId), eq(uploads.userId, userId), alive));
  return row;
}

export const listUploadParts = (reader: Reader, uploadId: string) =>
  reader.select({ number: uploadParts.number, storageKey: uploadParts.storageKey }).from(uploadParts).where(eq(uploadParts.uploadId, uploadId)).orderBy(asc(uploadParts.number));

/** What nobody came back for. Asked by the worker, which may not see whose it was. */
export const listOverdueUploads = (reader: Reader, most: number) => reader.select({ id: uploads.id }).from(uploads).where(lt(uploads.expiresAt, sql`now()`)).limit(most);
