import { Readable } from 'node:stream';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Finding } from '@/lib/engine/contract/finding';
import type { SignedInActor } from '@/lib/policy/actor';
import { addFile } from '@/lib/services/files/add-file';
import { answerFinding } from '@/lib/services/submissions/answer-finding';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { getDraft } from '@/lib/services/submissions/get-draft';
import { getReview } from '@/lib/services/submissions/get-lodged';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';
import { burstSheet } from '../../support/burst-sheet';
import { draftWithBursts, must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let author: SignedInActor;
let id: string;

/** A tone that is there from the first sample: a match of it is a match of what was cut. */
const cutTone = (hz: number): string =>
  Array.from({ length: 4096 }, (_, i) => `${(i / 4096).toFixed(9)} ${(1e-21 * Math.cos((2 * Math.PI * hz * i) / 4096)).toExponential(12)}`).join('\n');

const NOTHING = { code: '', where: '', text: '' };

const asked = async (): Promise<Finding[]> => {
  const { check } = must(await getDraft(author, id));
  if (check?.run.state !== 'measured') throw new Error('the check gave no numbers');
  return check.run.result.claims.flatMap((claim) => claim.findings).filter((finding) => finding.level === 'needs-answer');
};

beforeAll(async () => {
  desk = await openServiceDesk();
  author = await desk.person('T. Marrable');
  id = await draftWithBursts(author, burstSheet('0.1'));
  for (const [name, hz] of [['a.txt', 150], ['b.txt', 151]] as const) must(await addFile(author, id, { name, stream: Readable.from(cutTone(hz)) }));
  must(await checkDraft(author, id));
  await desk.runAll();
});
afterAll(() => desk.close());

describe('a finding that needs an answer', () => {
  it('stands in the way of lodging until it has one, and the sentence says about what', async () => {
    const found = await asked();
    expect(found.length).toBeGreaterThan(0);
    const refused = await lodgeSubmission(author, id);
    expect(refused).toMatchObject({ ok: false, error: { code: 'precondition' } });
    expect(must(await getDraft(author, id)).beforeLodging[0]).toContain(`needs your answer, about ${found[0]?.where}`);
  });

  it('is not answered by a word on something that was not found, nor by nothing', async () => {
    const [{ code, where, text } = NOTHING] = await asked();
    expect(await answerFinding(author, id, { code, where, text: `${text} `, answer: 'It is meant.' })).toMatchObject({ ok: false, error: { code: 'conflict' } });
    must(await answerFinding(author, id, { code, where, text, answer: '' }));
    expect(must(await getDraft(author, id)).revision.answers).toEqual([]);
  });

  it('can be answered and taken back by authors alone', async () => {
    const [{ code, where, text } = NOTHING] = await asked();
    const other = await desk.person('S. Vasterling');
    expect(await answerFinding(other, id, { code, where, text, answer: 'It is meant.' })).toMatchObject({ ok: false, error: { code: 'not-found' } });
    must(await answerFinding(author, id, { code, where, text, answer: 'First words.' }));
    must(await answerFinding(author, id, { code, where, text, answer: '' }));
    expect(must(await getDraft(author, id)).revision.answers).toEqual([]);
  });

  it('once answered lets the submission be lodged, and the answer stands with the revision', async () => {
    for (const { code, where, text } of await asked()) must(await answerFinding(author, id, { code, where, text, answer: 'Both tones are cut on purpose.' }));
    const { revision } = must(await lodgeSubmission(author, id));
    const review = must(await getReview(author, id, revision));
    expect(review.revision.answers.map((a) => a.answer)).toContain('Both tones are cut on purpose.');
    await expect(desk.sql('delete from finding_answers')).rejects.toThrow(/never change/);
  });
});
