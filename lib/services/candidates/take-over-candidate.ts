import { listCandidateAnswers } from '@/db/reads/candidates/candidate-answers';
import { findRevision } from '@/db/reads/submissions/revision';
import { getSubmissionHead } from '@/db/reads/submissions/submission-head';
import { saveRevision } from '@/db/writes/submissions/save-revision';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { asDraftSheet } from '@/lib/services/submissions/draft-sheet';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';
import { LODGED_ALREADY } from '@/lib/services/submissions/update-draft';
import { findCandidate, type NamedCandidate } from './answer-candidate';

type Settings = Readonly<Record<string, unknown>>;

/** The sheet with the settings of the reading declared in the named claims; a swept setting cannot be declared beside its sweep. */
export function withSettings(sheet: DraftSheet, claimIds: readonly string[], settings: Settings): DraftSheet {
  const own = (value: unknown): Settings => (typeof value === 'object' && value !== null && !Array.isArray(value) ? (value as Settings) : {});
  const claims = sheet.claims.map((claim) => {
    if (!claimIds.includes(String(claim['id']))) return claim;
    const swept = Object.keys(own(claim['over']));
    const declared = Object.fromEntries(Object.entries(settings).filter(([name]) => !swept.includes(name)));
    return { ...claim, settings: { ...own(claim['settings']), ...declared } };
  });
  return { ...sheet, claims };
}

/**
 * Puts what the authors confirmed into the revision they are writing: the settings of that reading, in the
 * claim it was offered for and in those it explains too. The lodged revision and its numbers stand.
 */
export function takeOverCandidate(actor: Actor, submissionId: string, input: NamedCandidate): Promise<Outcome<{ readonly version: number; readonly claims: readonly string[] }>> {
  return actOnSubmission({ actor, action: 'submission.edit', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    const found = await findCandidate(tx, submissionId, input);
    if (!found.ok) return found;
    const { candidate } = found.value;
    const given = (await listCandidateAnswers(tx, submissionId)).findLast((answer) => answer.runId === input.runId && answer.claimId === input.claim && answer.candidateId === candidate.id);
    if (given?.answer !== 'confirmed' || given.reading === null) return fail('conflict', 'Only what the authors confirmed is taken over. Answer the candidate first.');
    const reading = candidate.readings[given.reading];
    if (!reading || Object.keys(reading.settings).length === 0) return fail('conflict', 'No setting of the sheet says this reading. Correct the file, its declaration or the claimed number in the composer.');
    const { currentRevision } = await getSubmissionHead(tx, submissionId);
    const row = await findRevision(tx, submissionId, currentRevision);
    if (!row) return { ok: false, error: NOT_FOUND };
    const words = { title: row.title, statement: row.statement };
    const claims = [input.claim, ...candidate.explains];
    const version = await saveRevision(tx, grant, { revisionId: row.id, version: row.version }, { ...words, sheet: withSettings(asDraftSheet(row.sheet, words), claims, reading.settings) });
    if (version === undefined) return fail('conflict', 'Somebody saved the draft meanwhile. Try once more.');
    note({ revision: row.number, version, tookOver: candidate.id, claims });
    return ok({ version, claims });
  });
}
