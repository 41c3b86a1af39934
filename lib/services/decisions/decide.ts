import type { Transaction } from '@/db/client';
import { findLiveDecision } from '@/db/reads/decisions/decisions';
import { countReports } from '@/db/reads/reviews/reports';
import { recordDecision, type NewDecision } from '@/db/writes/decisions/record-decision';
import { moveSubmission } from '@/db/writes/submissions/move-submission';
import { err, ok, type Result } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { isSigned, openLevel, signingWords, type DecisionKind, type DecisionRemark, type Level } from '@/lib/reviews/decision';
import { draftNumbers, draftPoints } from '@/lib/reviews/letter';
import { follow, type MoveName } from '@/lib/reviews/transitions';
import { actOnSubmission } from '@/lib/services/act';
import { fail, type AppError, type Outcome } from '@/lib/services/app-error';
import { MOVED_ON } from '@/lib/services/reviews/move-facts';
import { findOfficialResult, type LodgedResult } from '@/lib/services/reviews/official-result';
import { loadLetterThreads } from './letter-threads';
import { tellAuthors } from './tell-authors';

/** Deciding is one act with one letter, whatever its kind; only the editor enters, and only the signer signs. */
export type DecisionRequest = {
  /** The editor's own words; the numbers and the points are taken from the result and the threads. */
  readonly prose: string;
  /** For the record's page; only with `enter`. */
  readonly publicSentence?: string | undefined;
  /** The first three words of the title. */
  readonly typed: string;
} & ({ readonly kind: 'back-with-author' | 'set-aside' } | { readonly kind: 'enter'; readonly level: Level; readonly remarks: readonly DecisionRemark[] });

const ACTIONS = { 'back-with-author': 'review.send-back', 'set-aside': 'review.set-aside', enter: 'review.enter' } as const satisfies Record<DecisionKind, string>;
export const LETTER_MAX_CHARACTERS = 20_000;
const SENTENCE_MAX_CHARACTERS = 600;

export function decide(actor: Actor, submissionId: string, request: DecisionRequest): Promise<Outcome<{ readonly decisionId: string }>> {
  return actOnSubmission({ actor, action: ACTIONS[request.kind], submissionId }, async ({ tx, grant, facts, note }) => {
    const official = await findOfficialResult(tx, submissionId);
    if (!official) return fail('precondition', 'There is no lodged revision to decide on.');
    const standing = await findLiveDecision(tx, submissionId, official.revision);
    if (standing.live) return fail('conflict', DECIDED);
    const problem = checkWords(request, official.title);
    if (problem) return problem;
    const decision = await compose(tx, facts, official, request, standing.attempts + 1);
    if (!decision.ok) return decision;
    const decisionId = await recordDecision(tx, grant, decision.value);
    if (decisionId === undefined) return fail('conflict', DECIDED);
    const to = leave(request.kind, facts);
    if (to !== null && !(to.ok && (await moveSubmission(tx, grant, { to: to.value })))) return fail('conflict', MOVED_ON);
    await tellAuthors(tx, actor, submissionId, official, { decisionId, ...decision.value });
    note({ decisionId, kind: request.kind, level: decision.value.level });
    return ok({ decisionId });
  });
}

const DECIDED = 'A decision on this revision stands already. Reload to read it.';

function checkWords(request: DecisionRequest, title: string) {
  if (!isSigned(title, request.typed))
    return fail('invalid', `To sign, type the first words of the title: ${signingWords(title)}`, [{ code: 'reviews/not-signed', where: '/typed', saw: request.typed, expected: signingWords(title) }]);
  const prose = request.prose.trim();
  if (prose === '' || prose.length > LETTER_MAX_CHARACTERS)
    return fail('invalid', 'A letter needs your own words.', [{ code: 'reviews/letter-length', where: '/prose', saw: `${prose.length} characters`, expected: `1 to ${LETTER_MAX_CHARACTERS}` }]);
  const sentence = request.publicSentence ?? '';
  if (sentence.length > SENTENCE_MAX_CHARACTERS)
    return fail('invalid', 'The sentence for the record is too long.', [{ code: 'reviews/sentence-length', where: '/publicSentence', saw: `${sentence.length} characters`, expected: `at most ${SENTENCE_MAX_CHARACTERS}` }]);
  return undefined;
}

/** Where the submission goes at once: nowhere when it is entered, for that is the signer's move. */
function leave(kind: DecisionKind, facts: SubmissionFacts) {
  if (kind === 'enter') return null;
  const move: MoveName = kind === 'back-with-author' ? 'send-back' : facts.state === 'triage' ? 'set-aside-in-triage' : 'set-aside';
  return follow(move, facts.state, { accepted: 0, reported: 0, decision: kind, hasSignedRecord: false });
}

async function compose(tx: Transaction, facts: SubmissionFacts, official: LodgedResult, request: DecisionRequest, attempt: number): Promise<Result<NewDecision, AppError>> {
  const entered = request.kind === 'enter' ? openLevel(request.level, { result: official.result, reports: await countReports(tx, facts.submissionId) }) : ok([]);
  if (!entered.ok) {
    const problems = entered.error.map((r) => ({ code: r.code, where: '/level', saw: r.text, expected: 'what the level asks for' }));
    return err({ code: 'precondition', sentence: `This level is not open. ${entered.error.map((r) => r.text).join(' ')}`, problems });
  }
  const points = draftPoints(await loadLetterThreads(tx, facts.submissionId));
  return ok({
    round: facts.round,
    revision: official.revision,
    attempt,
    kind: request.kind,
    level: request.kind === 'enter' ? request.level : null,
    remarks: request.kind === 'enter' ? request.remarks : [],
    covers: entered.value,
    runId: official.runId,
    letter: { numbers: official.result ? draftNumbers(official.result) : [], points, prose: request.prose.trim() },
    publicSentence: request.kind === 'enter' ? (request.publicSentence ?? '').trim() : '',
  });
}
