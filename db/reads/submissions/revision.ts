import { and, asc, desc, eq, isNotNull } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { revisionFiles, storedFiles } from '@/db/schema/files';
import { revisions } from '@/db/schema/submissions';

export type RevisionRow = typeof revisions.$inferSelect;

export async function findRevision(reader: Reader, submissionId: string, number: number): Promise<RevisionRow | undefined> {
  const [row] = await reader.select().from(revisions).where(and(eq(revisions.submissionId, submissionId), eq(revisions.number, number)));
  return row;
}

export async function findLatestLodged(reader: Reader, submissionId: string): Promise<RevisionRow | undefined> {
  const [row] = await reader
    .select()
    .from(revisions)
    .where(and(eq(revisions.submissionId, submissionId), isNotNull(revisions.lodgedAt)))
    .orderBy(desc(revisions.number))
    .limit(1);
  return row;
}

/** Files under the names by which the revision's sheet calls them, by name. */
export const listRevisionFiles = (reader: Reader, revisionId: string) =>
  reader
    .select({ id: storedFiles.id, name: revisionFiles.name, bytes: storedFiles.bytes, sha256: storedFiles.sha256, storageKey: storedFiles.storageKey })
    .from(revisionFiles)
    .innerJoin(storedFiles, eq(storedFiles.id, revisionFiles.fileId))
    .where(eq(revisionFiles.revisionId, revisionId))
    .orderBy(asc(revisionFiles.name));

export type RevisionFileRow = Awaited<ReturnType<typeof listRevisionFiles>>[number];
