import { createHmac } from 'node:crypto';
import type { Transaction } from '@/db/client';
import { listRevisionFiles, type RevisionRow } from '@/db/reads/submissions/revision';
import { requestRun } from '@/db/writes/runs/request-run';
import { ENGINE_VERSION } from '@/lib/engine/version';
import { enqueue } from '@/lib/jobs/enqueue';
import { urgencyOf } from '@/lib/jobs/urgency';
import type { SubmissionGrant } from '@/lib/policy/grant';
import { inputsDigest } from '@/lib/services/runs/inputs-digest';
import { asDraftSheet } from './draft-sheet';

type MayRun = SubmissionGrant<'submission.check'> | SubmissionGrant<'submission.lodge'> | SubmissionGrant<'record.recheck'>;

/** Asks for a run of the revision as it stands now: its sheet and file hashes are written into the run. */
export async function runRevision(tx: Transaction, grant: MayRun, row: RevisionRow, what: 'check' | 'official' | 'recheck'): Promise<string> {
  const sheet = asDraftSheet(row.sheet, row);
  const files = await listRevisionFiles(tx, row.id);
  const runId = await requestRun(tx, grant, {
    revisionId: row.id,
    kind: what === 'check' ? 'check' : 'official',
    engine: ENGINE_VERSION,
    sheet,
    inputs: files.map(({ name, sha256, bytes, storageKey }) => ({ name, sha256, bytes, storageKey })),
    inputsDigest: inputsDigest(sheet as unknown as Record<string, unknown>, files),
  });
  await enqueue(tx, 'run-submission', { runId }, { key: `run:${runId}`, queue: `submission:${row.submissionId}`, urgency: urgencyOf(what) });
  return runId;
}

/**
 * A queue of one person's own, so that their runs follow one another and do not crowd out others. The
 * worker must not learn who a referee is, so the name is keyed with a secret the worker does not hold.
 */
export const personalQueue = (userId: string, secret: string): string => `person:${createHmac('sha256', secret).update(userId).digest('hex').slice(0, 24)}`;
