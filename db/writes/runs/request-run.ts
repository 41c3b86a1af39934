import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { runProgress, runs, type RunInput, type RunKind } from '@/db/schema/runs';
import type { ReadOtherwise } from '@/lib/explain/read-otherwise';
import type { SubmissionGrant } from '@/lib/policy/grant';

export interface RunRequest {
  readonly revisionId: string;
  readonly kind: RunKind;
  readonly engine: string;
  readonly sheet: unknown;
  readonly inputs: readonly RunInput[];
  readonly inputsDigest: string;
  /** Of variations alone; the database refuses it of others. */
  readonly otherwise?: ReadOtherwise;
}

type MayRun = SubmissionGrant<'submission.check'> | SubmissionGrant<'submission.lodge'> | SubmissionGrant<'submission.vary'> | SubmissionGrant<'record.recheck'>;

/** A run and its place to tell progress. An official run that exists already for this revision and engine is found, not doubled. */
export async function requestRun(tx: Transaction, grant: MayRun, request: RunRequest): Promise<string> {
  const [made] = await tx
    .insert(runs)
    .values({ submissionId: grant.submissionId, ...request })
    .onConflictDoNothing()
    .returning({ id: runs.id });
  if (!made) return officialRun(tx, request);
  await tx.insert(runProgress).values({ runId: made.id });
  return made.id;
}

async function officialRun(tx: Transaction, request: RunRequest): Promise<string> {
  const [there] = await tx
    .select({ id: runs.id })
    .from(runs)
    .where(and(eq(runs.revisionId, request.revisionId), eq(runs.engine, request.engine), eq(runs.kind, 'official')));
  if (!there) throw new Error('the run was neither made nor found');
  return there.id;
}
