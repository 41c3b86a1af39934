import { and, asc, eq, getTableColumns, gt, lt, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { uploadParts, uploads } from '@/db/schema/uploads';

export type UploadRow = typeof uploads.$inferSelect;

const alive = gt(uploads.expiresAt, sql`now()`);

/** One person's own uploads to a submission that are not over yet. */
export const listUploads = (reader: Reader, submissionId: string, userId: string): Promise<UploadRow[]> =>
  reader.select().from(uploads).where(and(eq(uploads.submissionId, submissionId), eq(uploads.userId, userId), alive)).orderBy(asc(uploads.name));

/** That person's one upload of this name, also when its time is over and the worker has not come by yet. */
export async function findUploadNamed(reader: Reader, submissionId: string, userId: string, name: string) {
  const [row] = await reader
    .select({ ...getTableColumns(uploads), over: sql<boolean>`${uploads.expiresAt} <= now()` })
    .from(uploads)
    .where(and(eq(uploads.submissionId, submissionId), eq(uploads.userId, userId), eq(uploads.name, name)));
  return row;
}

/** Names on their way to a submission, whoever sends them. */
export const listNamesUnderWay = async (reader: Reader, submissionId: string): Promise<string[]> =>
  (await reader.selectDistinct({ name: uploads.name }).from(uploads).where(and(eq(uploads.submissionId, submissionId), alive))).map((row) => row.name);

/** What one person has announced and not finished, over all submissions. */
export async function sumAnnouncedBytes(reader: Reader, userId: string): Promise<number> {
  const [row] = await reader.select({ bytes: sql<string>`coalesce(sum(${uploads.bytes}), 0)` }).from(uploads).where(and(eq(uploads.userId, userId), alive));
  return Number(row?.bytes ?? 0);
}

export async function findUpload(reader: Reader, submissionId: string, userId: string, uploadId: string): Promise<UploadRow | undefined> {
  const [row] = await reader.select().from(uploads).where(and(eq(uploads.id, uploadId), eq(uploads.submissionId, submissionId), eq(uploads.userId, userId), alive));
  return row;
}

export const listUploadParts = (reader: Reader, uploadId: string) =>
  reader.select({ number: uploadParts.number, storageKey: uploadParts.storageKey }).from(uploadParts).where(eq(uploadParts.uploadId, uploadId)).orderBy(asc(uploadParts.number));

/** What nobody came back for. Asked by the worker, which may not see whose it was. */
export const listOverdueUploads = (reader: Reader, most: number) => reader.select({ id: uploads.id }).from(uploads).where(lt(uploads.expiresAt, sql`now()`)).limit(most);
