import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { database } from '@/db/client';
import type { Candidate } from '@/lib/explain/candidate';
import type { SignedInActor } from '@/lib/policy/actor';
import { answerCandidate } from '@/lib/services/candidates/answer-candidate';
import { takeOverCandidate } from '@/lib/services/candidates/take-over-candidate';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { getDraft } from '@/lib/services/submissions/get-draft';
import type { DraftView } from '@/lib/services/submissions/submission-view';
import { burstSheet } from '../../support/burst-sheet';
import { draftWithBursts, must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let author: SignedInActor;
let id: string;

/** ρ² = A² s √π / S for a burst in white noise; the author counts two detectors and does not say so. */
const TWO_DETECTORS = (Math.SQRT2 * Math.sqrt((1e-42 * 0.01 * Math.sqrt(Math.PI)) / 4e-46)).toFixed(3);
const claim = { id: 'C1', quantity: 'snr', of: { a: 'A' }, noise: 'W', settings: { fHighHz: 1900, taper: 'none' }, over: { fLowHz: [10, 50] }, claimed: [TWO_DETECTORS, TWO_DETECTORS] };

beforeAll(async () => {
  desk = await openServiceDesk();
  author = await desk.person('T. Marrable');
  id = await draftWithBursts(author, { ...burstSheet(), claims: [claim] });
  must(await checkDraft(author, id));
  await desk.runAll({ searching: true });
});
afterAll(() => desk.close());

async function offered(): Promise<{ readonly draft: DraftView; readonly runId: string; readonly candidate: Candidate; readonly detectors: number }> {
  const draft = must(await getDraft(author, id));
  const run = draft.check?.run;
  if (run?.state !== 'measured') throw new Error('the check gave no numbers');
  const candidate = run.result.claims[0]?.candidates[0];
  if (!candidate) throw new Error('the search found nothing');
  return { draft, runId: run.id, candidate, detectors: candidate.readings.findIndex(({ conventions }) => conventions.includes('C16')) };
}

describe('a candidate of a check', () => {
  it('is a class that the number alone cannot tell apart, with a chance beside it', async () => {
    const { candidate, detectors } = await offered();
    expect(candidate.standing).toBe('candidate');
    expect(candidate.readings.length).toBeGreaterThan(1);
    expect(candidate.readings[detectors]?.settings).toEqual({ detectors: 2 });
    expect(candidate.chance).toBeLessThan(0.05);
  });

  it('is not confirmed without saying which of its readings it was', async () => {
    const { runId, candidate } = await offered();
    const refused = await answerCandidate(author, id, { runId, claim: 'C1', candidate: candidate.id, reading: null, answer: 'confirmed', note: '' });
    expect(refused).toMatchObject({ ok: false, error: { code: 'invalid' } });
    expect(must(await getDraft(author, id)).candidateAnswers).toEqual([]);
  });

  it('is answered by its authors alone, about a candidate that the run offered', async () => {
    const { runId, candidate } = await offered();
    const answer = { runId, claim: 'C1', candidate: candidate.id, reading: null, answer: 'cannot-tell', note: 'Looking it up.' } as const;
    expect(await answerCandidate(await desk.person('S. Vasterling'), id, answer)).toMatchObject({ ok: false, error: { code: 'not-found' } });
    expect(await answerCandidate(author, id, { ...answer, candidate: 'C99:nothing' })).toMatchObject({ ok: false, error: { code: 'invalid' } });
    must(await answerCandidate(author, id, answer));
    expect(must(await getDraft(author, id)).candidateAnswers).toMatchObject([{ claim: 'C1', answer: 'cannot-tell', note: 'Looking it up.', revision: 1 }]);
  });

  it('changes nothing of the sheet before it is confirmed', async () => {
    const { runId, candidate, detectors } = await offered();
    const refused = await takeOverCandidate(author, id, { runId, claim: 'C1', candidate: candidate.id, reading: detectors });
    expect(refused).toMatchObject({ ok: false, error: { code: 'conflict' } });
    expect(must(await getDraft(author, id)).revision.sheet.claims[0]).toMatchObject({ settings: { fHighHz: 1900, taper: 'none' } });
  });

  it('becomes a declared setting once confirmed, and the claim then agrees; earlier answers stand', async () => {
    const { runId, candidate, detectors, draft } = await offered();
    must(await answerCandidate(author, id, { runId, claim: 'C1', candidate: candidate.id, reading: detectors, answer: 'confirmed', note: '' }));
    const taken = must(await takeOverCandidate(author, id, { runId, claim: 'C1', candidate: candidate.id, reading: null }));
    expect(taken).toMatchObject({ version: draft.revision.version + 1, claims: ['C1'] });
    const after = must(await getDraft(author, id));
    expect(after.revision.sheet.claims[0]).toMatchObject({ settings: { fHighHz: 1900, taper: 'none', detectors: 2 } });
    expect(after.candidateAnswers.map(({ answer }) => answer)).toEqual(['cannot-tell', 'confirmed']);
    must(await checkDraft(author, id));
    await desk.runAll({ searching: true });
    const run = must(await getDraft(author, id)).check?.run;
    expect(run?.state === 'measured' && run.result.claims[0]).toMatchObject({ verdict: 'agrees', candidates: [] });
  });

  it('keeps every answer: a row is never changed or taken away', async () => {
    await desk.sql('grant update, delete on candidate_answers to counterfoil_web');
    const before = await desk.sql('select * from candidate_answers');
    for (const statement of ["update candidate_answers set answer = 'not-so'", 'delete from candidate_answers']) await expect(database().$client.query(statement), statement).rejects.toThrow('never changed or removed');
    expect(await desk.sql('select * from candidate_answers')).toEqual(before);
  });
});
