import { database } from '@/db/client';
import { findRecord } from '@/db/reads/records/record';
import { findRevision } from '@/db/reads/submissions/revision';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { runRevision } from '@/lib/services/submissions/run-draft';

/** Asks the present engine to measure a published record again. Where it has measured it already, that run is named. */
export async function requestRecheck(actor: Actor, recordId: string): Promise<Outcome<{ readonly runId: string }>> {
  const record = await findRecord(database(), recordId);
  if (!record) return { ok: false, error: NOT_FOUND };
  return actOnSubmission({ actor, action: 'record.recheck', submissionId: record.submissionId }, async ({ tx, grant, note }) => {
    const row = await findRevision(tx, record.submissionId, record.revision);
    if (!row) return { ok: false, error: NOT_FOUND };
    const runId = await runRevision(tx, grant, row, 'recheck');
    note({ recordId, runId });
    return ok({ runId });
  });
}
