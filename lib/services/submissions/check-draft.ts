import { countUnfinishedRuns } from '@/db/reads/runs/unfinished-runs';
import { findMeasuredRun, findReadings } from '@/db/reads/runs/run';
import { findRevision, listRevisionFiles } from '@/db/reads/submissions/revision';
import { getSubmissionHead } from '@/db/reads/submissions/submission-head';
import { moveSubmission } from '@/db/writes/submissions/move-submission';
import { ENGINE_VERSION } from '@/lib/engine/version';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { isCurrent } from './before-lodging';
import { asDraftSheet } from './draft-sheet';
import { runRevision } from './run-draft';
import { LODGED_ALREADY } from './update-draft';

/** Runs that one author may have under way, so that nobody's queue holds up the others. */
const UNFINISHED_AT_MOST = 3;

/** Asks for the server's reading before lodging. When nothing changed since the last that has numbers, and that keeps all a check keeps now, it stands. */
export function checkDraft(actor: Actor, submissionId: string): Promise<Outcome<{ readonly runId: string }>> {
  return actOnSubmission({ actor, action: 'submission.check', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    const { currentRevision, ownerId } = await getSubmissionHead(tx, submissionId);
    const row = await findRevision(tx, submissionId, currentRevision);
    if (!row) return { ok: false, error: NOT_FOUND };
    const sheet = asDraftSheet(row.sheet, row);
    if (sheet.claims.length === 0) return fail('precondition', 'No number is claimed yet, so there is nothing to check. Add a claim.');
    const last = await findMeasuredRun(tx, row.id, 'check');
    const stands = last?.engine === ENGINE_VERSION && isCurrent(last.inputsDigest, sheet, await listRevisionFiles(tx, row.id));
    if (last && stands && (await findReadings(tx, last.id)) !== null) return ok({ runId: last.id });
    if ((await countUnfinishedRuns(tx, ownerId)) >= UNFINISHED_AT_MOST)
      return fail('limit', `${UNFINISHED_AT_MOST} runs of yours are under way. Wait for one to end.`);
    if (!(await moveSubmission(tx, grant, { to: 'checking' }))) return fail('conflict', 'The submission has moved on meanwhile. Reload to see where it stands.');
    const runId = await runRevision(tx, grant, row, 'check');
    note({ revision: row.number, runId });
    return ok({ runId });
  });
}
