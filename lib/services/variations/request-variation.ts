import { z } from 'zod';
import type { Transaction } from '@/db/client';
import { findReadings } from '@/db/reads/runs/run';
import { listRevisionFiles, type RevisionRow } from '@/db/reads/submissions/revision';
import { countVariations } from '@/db/reads/variations/variations';
import { requestRun } from '@/db/writes/runs/request-run';
import { recordVariation } from '@/db/writes/variations/record-variation';
import { ENGINE_VERSION } from '@/lib/engine/version';
import type { ReadOtherwise } from '@/lib/explain/read-otherwise';
import { webEnv } from '@/lib/env';
import { enqueue } from '@/lib/jobs/enqueue';
import { urgencyOf } from '@/lib/jobs/urgency';
import { ok } from '@/lib/kernel/result';
import { readingsOfClaim } from '@/lib/pipeline/explain/offered-readings';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import type { SubmissionFacts } from '@/lib/policy/facts';
import type { SubmissionGrant } from '@/lib/policy/grant';
import { actOnSubmission } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';
import { inputsDigest } from '@/lib/services/runs/inputs-digest';
import { asDraftSheet } from '@/lib/services/submissions/draft-sheet';
import { personalQueue } from '@/lib/services/submissions/run-draft';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';
import { changesInput } from './changes';
import { findBase } from './find-base';
import { otherwiseOf, readingsOf } from './read-otherwise';
import { readable, varySheet } from './vary-sheet';

export const variationInput = z.strictObject({
  claimId: z.string().min(1).max(64),
  changes: changesInput,
  note: z.string().max(2000).default(''),
  revision: z.int().min(1).max(9999).optional().describe('Number of the revision to vary; else the newest lodged one, else your draft.'),
});
export type VariationInput = z.input<typeof variationInput>;

/** Reruns a day: those with a part in the submission sixty, other readers ten; three under way at once. */
export const UNFINISHED_VARIATIONS = 3;
export const dailyQuota = (facts: Pick<SubmissionFacts, 'authorship' | 'referee'>, accountRole: string): number =>
  facts.authorship || facts.referee || accountRole === 'editor' ? 60 : 10;

/** Asks for a rerun of one claim with other settings. Seen by the one who asks alone; it changes no number of the record. */
export function requestVariation(actor: Actor, submissionId: string, input: z.output<typeof variationInput>): Promise<Outcome<{ readonly variationId: string; readonly runId: string }>> {
  return actOnSubmission({ actor, action: 'submission.vary', submissionId }, async ({ tx, grant, facts, note }) => {
    const full = await quotaSpent(tx, actor, facts);
    if (full) return full;
    const base = await findBase(tx, facts, input.revision);
    if (!base.ok) return base;
    const { row, run } = base.value;
    const declared = asDraftSheet(row.sheet, row);
    const varied = varySheet(declared, input.claimId, input.changes);
    const sheet = varied.ok ? readable(varied.value, input.changes, declared) : varied;
    if (!sheet.ok) return sheet;
    const read = readingsOf(input.changes, readingsOfClaim((await findReadings(tx, run.id)) ?? {}, input.claimId));
    if (!read.ok) return read;
    const { readings: _ids, ...changes } = input.changes;
    const kept = { ...changes, ...(read.value.length > 0 && { readings: read.value }) };
    const runId = await askRun(tx, grant, row, { sheet: sheet.value, ...otherwiseOf(kept) });
    const variationId = await recordVariation(tx, grant, { runId, revisionId: row.id, baseRunId: run.id, claimId: input.claimId, changes: kept, note: input.note.trim() });
    note({ variationId });
    return ok({ variationId, runId });
  });
}

async function quotaSpent(tx: Transaction, actor: Actor, facts: SubmissionFacts): Promise<ReturnType<typeof fail> | null> {
  const counts = await countVariations(tx, facts.submissionId, userIdOf(actor) ?? '', 24);
  const quota = dailyQuota(facts, 'accountRole' in actor ? actor.accountRole : 'member');
  if (counts.open >= UNFINISHED_VARIATIONS) return fail('limit', `${UNFINISHED_VARIATIONS} variations of yours are under way. Wait for one to end, or stop one.`);
  return counts.lately >= quota ? fail('limit', `${quota} variations of this submission were asked for within 24 hours, which is as many as you may. The oldest makes room again a day after it was asked for.`) : null;
}

interface Asked {
  readonly sheet: DraftSheet;
  readonly otherwise?: ReadOtherwise;
}

async function askRun(tx: Transaction, grant: SubmissionGrant<'submission.vary'>, row: RevisionRow, { sheet, otherwise }: Asked): Promise<string> {
  const files = await listRevisionFiles(tx, row.id);
  const runId = await requestRun(tx, grant, {
    revisionId: row.id,
    kind: 'variation',
    engine: ENGINE_VERSION,
    sheet,
    inputs: files.map(({ name, sha256, bytes, storageKey }) => ({ name, sha256, bytes, storageKey })),
    inputsDigest: inputsDigest({ ...(sheet as unknown as Record<string, unknown>), ...(otherwise && { otherwise }) }, files),
    ...(otherwise && { otherwise }),
  });
  await enqueue(tx, 'run-submission', { runId }, { key: `run:${runId}`, queue: personalQueue(userIdOf(grant.actor) ?? '', webEnv().AUTH_SECRET), urgency: urgencyOf('variation') });
  return runId;
}
