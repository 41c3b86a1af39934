import type { Database, Transaction } from '@/db/client';
import { findSubmissionFacts } from '@/db/reads/submissions/submission-facts';
import { recordAudit } from '@/db/writes/audit/record-audit';
import { recordResult, type RunFinding } from '@/db/writes/runs/record-result';
import { endProgress } from '@/db/writes/runs/tell-progress';
import { moveSubmission } from '@/db/writes/submissions/move-submission';
import type { RunKind } from '@/db/schema/runs';
import { may } from '@/lib/policy/grant';
import { WORKER } from './worker-actor';

interface Run {
  readonly id: string;
  readonly submissionId: string;
  readonly kind: RunKind;
  /** Number of the revision it is about. */
  readonly revisionNumber: number;
}

/**
 * Stores what a run found and moves the submission on, in one transaction and once: a second worker
 * that comes with the same run finds the first one's result and changes nothing.
 */
export async function completeRun(db: Database, run: Run, finding: RunFinding): Promise<'recorded' | 'was-recorded'> {
  return db.transaction(async (tx) => {
    const facts = await findSubmissionFacts(tx, WORKER, run.submissionId, true);
    if (!facts) throw new Error(`run ${run.id} belongs to no submission`);
    if (!(await recordResult(tx, run.id, finding))) return 'was-recorded';
    await endProgress(tx, { runId: run.id, submissionId: run.submissionId }, { state: 'finished' });
    await moveOn(tx, run, facts, run.kind === 'official' ? 'triage' : backTo(run));
    const digest = finding.outcome === 'measured' ? { resultDigest: finding.resultDigest } : {};
    await recordAudit(tx, { actor: WORKER, action: `run.finish-${run.kind}`, subjectKind: 'submission', subjectId: run.submissionId, details: { runId: run.id, outcome: finding.outcome, ...digest } });
    return 'recorded';
  });
}

/** After the last try: told to people, and the author gets the draft back. */
export async function giveUpRun(tx: Transaction, run: Run, attempts: number): Promise<void> {
  const because = 'The computation broke off three times on our side. The administrator has been told; nothing of yours was changed.';
  const facts = await findSubmissionFacts(tx, WORKER, run.submissionId, true);
  if (!facts) return;
  await endProgress(tx, { runId: run.id, submissionId: run.submissionId }, { state: 'stopped', because });
  // A lodged submission stays lodged: its official run is owed, and a retry completes it.
  if (run.kind === 'check') await moveOn(tx, run, facts, backTo(run));
  await recordAudit(tx, { actor: WORKER, action: 'run.give-up', subjectKind: 'submission', subjectId: run.submissionId, details: { runId: run.id, attempts } });
}

/** Whoever asked for it wants it no longer, and no number was there yet. An official run is never asked to stop. */
export async function endStoppedRun(db: Database, run: Run): Promise<void> {
  const because = 'Stopped by the one who asked for it, before there was a number. Nothing was kept of it; ask again when you like.';
  await db.transaction(async (tx) => {
    const facts = await findSubmissionFacts(tx, WORKER, run.submissionId, true);
    if (!facts) throw new Error(`run ${run.id} belongs to no submission`);
    await endProgress(tx, { runId: run.id, submissionId: run.submissionId }, { state: 'stopped', because });
    await moveOn(tx, run, facts, backTo(run));
    await recordAudit(tx, { actor: WORKER, action: 'run.end-stopped', subjectKind: 'submission', subjectId: run.submissionId, details: { runId: run.id } });
  });
}

const backTo = (run: Run): 'draft' | 'back-with-author' => (run.revisionNumber > 1 ? 'back-with-author' : 'draft');

/** Only from the state in which the machine may: a submission withdrawn meanwhile stays withdrawn. */
async function moveOn(tx: Transaction, run: Run, facts: NonNullable<Awaited<ReturnType<typeof findSubmissionFacts>>>, to: 'triage' | 'draft' | 'back-with-author'): Promise<void> {
  if (run.kind === 'variation') return;
  const grant = may(run.kind === 'check' ? 'run.finish-check' : 'run.finish-official', WORKER, facts);
  if (grant.ok) await moveSubmission(tx, grant.value, { to });
}
