import { z } from 'zod';
import type { Transaction } from '@/db/client';
import { findLatestLodged, listRevisionFiles, type RevisionRow } from '@/db/reads/submissions/revision';
import { countVariations } from '@/db/reads/variations/variations';
import { requestRun } from '@/db/writes/runs/request-run';
import { recordVariation } from '@/db/writes/variations/record-variation';
import { ENGINE_VERSION } from '@/lib/engine/version';
import { webEnv } from '@/lib/env';
import { enqueue } from '@/lib/jobs/enqueue';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import type { SubmissionFacts } from '@/lib/policy/facts';
import type { SubmissionGrant } from '@/lib/policy/grant';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { inputsDigest } from '@/lib/services/runs/inputs-digest';
import { asDraftSheet } from '@/lib/services/submissions/draft-sheet';
import { personalQueue } from '@/lib/services/submissions/run-draft';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';
import { varySheet } from './vary-sheet';

const hertz = z.number().positive().max(1e6);

export const variationInput = z.strictObject({
  claimId: z.string().min(1).max(64),
  changes: z
    .strictObject({
      fLowHz: hertz.optional(),
      fHighHz: hertz.optional(),
      totalMassMsun: z.number().positive().max(1e12).optional(),
      noise: z.union([z.strictObject({ curve: z.string().min(1).max(16) }), z.strictObject({ named: z.string().min(1).max(64) })]).optional(),
    })
    .refine((changes) => Object.keys(changes).length > 0, 'at least one changed setting'),
  note: z.string().max(2000).default(''),
});
export type VariationInput = z.input<typeof variationInput>;

/** Reruns a day: those with a part in the submission sixty, other readers ten; three under way at once. */
export const UNFINISHED_VARIATIONS = 3;
export const dailyQuota = (facts: Pick<SubmissionFacts, 'authorship' | 'referee'>, accountRole: string): number =>
  facts.authorship || facts.referee || accountRole === 'editor' ? 60 : 10;

/** Asks for a rerun of one lodged claim with other settings. Seen by the one who asks alone; it changes no number of the record. */
export function requestVariation(actor: Actor, submissionId: string, input: z.output<typeof variationInput>): Promise<Outcome<{ readonly variationId: string; readonly runId: string }>> {
  return actOnSubmission({ actor, action: 'submission.vary', submissionId }, async ({ tx, grant, facts, note }) => {
    const full = await quotaSpent(tx, actor, facts);
    if (full) return full;
    const row = await findLatestLodged(tx, submissionId);
    if (!row) return { ok: false, error: NOT_FOUND };
    const sheet = varySheet(asDraftSheet(row.sheet, row), input.claimId, input.changes);
    if (!sheet.ok) return sheet;
    const runId = await askRun(tx, grant, row, sheet.value);
    const variationId = await recordVariation(tx, grant, { runId, revisionId: row.id, claimId: input.claimId, changes: input.changes, note: input.note });
    note({ variationId });
    return ok({ variationId, runId });
  });
}

async function quotaSpent(tx: Transaction, actor: Actor, facts: SubmissionFacts): Promise<ReturnType<typeof fail> | null> {
  const counts = await countVariations(tx, facts.submissionId, userIdOf(actor) ?? '', 24);
  const quota = dailyQuota(facts, 'accountRole' in actor ? actor.accountRole : 'member');
  if (counts.open >= UNFINISHED_VARIATIONS) return fail('limit', `${UNFINISHED_VARIATIONS} variations of yours are under way. Wait for one to end.`);
  return counts.lately >= quota ? fail('limit', `${quota} variations were asked for here within a day. Try again tomorrow.`) : null;
}

async function askRun(tx: Transaction, grant: SubmissionGrant<'submission.vary'>, row: RevisionRow, sheet: DraftSheet): Promise<string> {
  const files = await listRevisionFiles(tx, row.id);
  const runId = await requestRun(tx, grant, {
    revisionId: row.id,
    kind: 'variation',
    engine: ENGINE_VERSION,
    sheet,
    inputs: files.map(({ name, sha256, bytes, storageKey }) => ({ name, sha256, bytes, storageKey })),
    inputsDigest: inputsDigest(sheet as unknown as Record<string, unknown>, files),
  });
  await enqueue(tx, 'run-submission', { runId }, { key: `run:${runId}`, queue: personalQueue(userIdOf(grant.actor) ?? '', webEnv().AUTH_SECRET) });
  return runId;
}
