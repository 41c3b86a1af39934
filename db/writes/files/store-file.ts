import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { revisionFiles, storedFiles } from '@/db/schema/files';
import { userIdOf } from '@/lib/policy/actor';
import type { SubmissionGrant, Grant } from '@/lib/policy/grant';

export interface UploadedFile {
  readonly name: string;
  readonly sha256: string;
  readonly bytes: number;
  readonly storageKey: string;
}

type MayStore = SubmissionGrant<'submission.edit'> | Grant<'submission.create'>;

/**
 * Records bytes that are already in the store and gives them a name in the revision; the name's
 * former file is let go. The same bytes again in one submission are the same row.
 */
export async function storeFile(tx: Transaction, grant: MayStore, into: { readonly submissionId: string; readonly revisionId: string }, file: UploadedFile) {
  const uploadedBy = userIdOf(grant.actor);
  if (uploadedBy === null) throw new Error('a file needs somebody who uploaded it');
  await tx
    .insert(storedFiles)
    .values({ submissionId: into.submissionId, sha256: file.sha256, bytes: file.bytes, storageKey: file.storageKey, originalName: file.name, uploadedBy })
    .onConflictDoNothing({ target: [storedFiles.submissionId, storedFiles.sha256] });
  const [stored] = await tx
    .select({ id: storedFiles.id, storageKey: storedFiles.storageKey })
    .from(storedFiles)
    .where(and(eq(storedFiles.submissionId, into.submissionId), eq(storedFiles.sha256, file.sha256)));
  if (!stored) throw new Error('the stored file is not there');
  await tx.delete(revisionFiles).where(and(eq(revisionFiles.revisionId, into.revisionId), eq(revisionFiles.name, file.name)));
  await tx.insert(revisionFiles).values({ revisionId: into.revisionId, name: file.name, fileId: stored.id });
  return stored;
}

/** Takes a name out of the revision; the bytes stay, since a run may have read them. */
export async function dropFile(tx: Transaction, _grant: SubmissionGrant<'submission.edit'>, revisionId: string, name: string): Promise<boolean> {
  const gone = await tx
    .delete(revisionFiles)
    .where(and(eq(revisionFiles.revisionId, revisionId), eq(revisionFiles.name, name)))
    .returning({ name: revisionFiles.name });
  return gone.length === 1;
}
