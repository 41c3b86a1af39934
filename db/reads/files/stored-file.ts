import { and, eq, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { revisionFiles, storedFiles } from '@/db/schema/files';
import { revisions } from '@/db/schema/submissions';

/** Where bytes with this digest already lie, whoever brought them: they need no second copy. */
export async function findStorageKey(reader: Reader, sha256: string): Promise<string | undefined> {
  const [row] = await reader.select({ key: storedFiles.storageKey }).from(storedFiles).where(eq(storedFiles.sha256, sha256)).limit(1);
  return row?.key;
}

/** Whether any row points at this object. A row and its object have one digest, which is what the index knows. */
export async function isStored(reader: Reader, object: { readonly sha256: string; readonly storageKey: string }): Promise<boolean> {
  const rows = await reader.select({ id: storedFiles.id }).from(storedFiles).where(and(eq(storedFiles.sha256, object.sha256), eq(storedFiles.storageKey, object.storageKey))).limit(1);
  return rows.length > 0;
}

/** Bytes that this submission already holds, whatever name they had. */
export async function findStoredFile(reader: Reader, submissionId: string, by: { readonly fileId: string } | { readonly sha256: string }) {
  const is = 'fileId' in by ? eq(storedFiles.id, by.fileId) : eq(storedFiles.sha256, by.sha256);
  const [row] = await reader.select({ bytes: storedFiles.bytes, sha256: storedFiles.sha256, storageKey: storedFiles.storageKey }).from(storedFiles).where(and(eq(storedFiles.submissionId, submissionId), is));
  return row;
}

/** A file of this submission and the revisions that use it. */
export const listFileUses = (reader: Reader, submissionId: string, fileId: string) =>
  reader
    .select({ name: revisionFiles.name, bytes: storedFiles.bytes, sha256: storedFiles.sha256, storageKey: storedFiles.storageKey, lodged: sql<boolean>`${revisions.lodgedAt} is not null` })
    .from(storedFiles)
    .innerJoin(revisionFiles, eq(revisionFiles.fileId, storedFiles.id))
    .innerJoin(revisions, eq(revisions.id, revisionFiles.revisionId))
    .where(and(eq(storedFiles.submissionId, submissionId), eq(storedFiles.id, fileId)));
