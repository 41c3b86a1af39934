import { z } from 'zod';
import type { Transaction } from '@/db/client';
import { findMeasuredRun } from '@/db/reads/runs/run';
import { listFindingAnswers } from '@/db/reads/submissions/finding-answers';
import type { RevisionRow } from '@/db/reads/submissions/revision';
import { writeAnswer } from '@/db/writes/submissions/answer-finding';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { currentRevision } from '@/lib/services/files/add-file';
import { GUESS_CODE } from '@/lib/pipeline/guesses/guess-state';
import { asDraftSheet } from './draft-sheet';
import { MOST_GUESS_ANSWERS, namesGuess } from './names-guess';
import { LODGED_ALREADY } from './update-draft';

export const findingAnswer = z.strictObject({
  code: z.string().min(1).max(200),
  where: z.string().max(500),
  text: z.string().min(1).max(2000),
  answer: z.string().max(2000, 'at most 2,000 characters').transform((answer) => answer.trim()),
});
export type FindingAnswerInput = z.output<typeof findingAnswer>;

/** The authors' word on a finding of the latest check, or on a guess that their browser or a check made; an empty one takes it back. */
export function answerFinding(actor: Actor, submissionId: string, input: FindingAnswerInput): Promise<Outcome<null>> {
  return actOnSubmission({ actor, action: 'submission.edit', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    const row = await currentRevision(tx, submissionId);
    if (!row) return { ok: false, error: NOT_FOUND };
    const nothing = await (input.code.startsWith(GUESS_CODE) ? noGuess(tx, row, input) : noFinding(tx, row, input));
    if (nothing !== null) return fail('conflict', nothing);
    await writeAnswer(tx, grant, row.id, input, input.answer);
    note({ answered: input.code, where: input.where });
    return ok(null);
  });
}

async function noFinding(tx: Transaction, { id }: RevisionRow, { code, where, text }: FindingAnswerInput): Promise<string | null> {
  const run = await findMeasuredRun(tx, id, 'check');
  const found = run?.result?.claims.some((claim) => claim.findings.some((f) => f.code === code && f.where === where && f.text === text));
  return found ? null : 'The latest check has no such finding. Look at its findings again; they may have changed with a later check.';
}

/** A browser guesses by itself, so no run is asked; what is kept is bounded instead. */
async function noGuess(tx: Transaction, row: RevisionRow, input: FindingAnswerInput): Promise<string | null> {
  if (!namesGuess(asDraftSheet(row.sheet, row), input)) return 'The draft has nothing of that name to guess of. It may have been renamed; look at its waveforms and curves again.';
  const answers = await listFindingAnswers(tx, row.id);
  if (input.answer === '' || answers.filter(({ code }) => code.startsWith(GUESS_CODE)).length < MOST_GUESS_ANSWERS) return null;
  return `This revision has ${MOST_GUESS_ANSWERS} answers to guesses, which is as many as are kept. Take one back first.`;
}
