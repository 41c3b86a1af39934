import { Readable } from 'node:stream';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { SignedInActor } from '@/lib/policy/actor';
import { guessState, namedGuess } from '@/lib/pipeline/guesses/guess-state';
import type { SheetGuess } from '@/lib/pipeline/guesses/sheet-guess';
import { addFile } from '@/lib/services/files/add-file';
import { answerFinding } from '@/lib/services/submissions/answer-finding';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { createDraft } from '@/lib/services/submissions/create-draft';
import { answerTo } from '@/lib/services/submissions/finding-answers';
import { getDraft } from '@/lib/services/submissions/get-draft';
import { updateDraft } from '@/lib/services/submissions/update-draft';
import { turningBurst } from '../../support/turning-burst';
import { must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let author: SignedInActor;
let id: string;
const { sheet, files } = turningBurst('M', { id: 'C1', quantity: 'radiated-energy', of: { a: 'A' }, claimed: '0.1' });
/** The same burst with its third column the other way round. */
const reversed = (files['a.txt'] ?? '').split('\n').map((row) => row.replace(/(-?)([\d.e+-]+)$/, (_, sign: string, size: string) => (sign === '-' ? size : `-${size}`))).join('\n');

/** What a check says of the rotation, how it stands, and the number that it must not move. */
async function checked(): Promise<{ readonly guess: SheetGuess; readonly state: string; readonly value: number | null }> {
  must(await checkDraft(author, id));
  await desk.runAll();
  const { check, revision } = must(await getDraft(author, id));
  if (check?.run.state !== 'measured') throw new Error('the check gave no numbers');
  const guess = check.run.result.guesses?.find(({ about }) => about === 'rotation');
  if (!guess) throw new Error('nothing was guessed of the rotation');
  return { guess, state: guessState(guess, answerTo(revision.answers, namedGuess(guess)) !== null), value: check.run.result.claims[0]?.points[0]?.value ?? null };
}

const patch = async (A: object): Promise<void> => {
  const { revision } = must(await getDraft(author, id));
  must(await updateDraft(author, id, { version: revision.version, sheet: { waveforms: { A } as never, claims: sheet.claims as never } }));
};
const declared = sheet.waveforms['A'] as object;

beforeAll(async () => {
  desk = await openServiceDesk();
  author = await desk.person('T. Marrable');
  id = must(await createDraft(author, { title: 'A burst that turns' })).id;
  must(await addFile(author, id, { name: 'a.txt', stream: Readable.from(reversed) }));
  await patch(declared);
});
afterAll(() => desk.close());

describe('a guess at the sense of rotation', () => {
  it('is unanswered at first; not so keeps the word assumed, and the next check does not ask again', async () => {
    const first = await checked();
    expect(first).toMatchObject({ state: 'unanswered', guess: { standing: 'assumed', agrees: false, field: '/waveforms/A/polarisation' } });
    must(await answerFinding(author, id, { ...namedGuess(first.guess), answer: 'Not so.' }));
    const again = await checked();
    expect(again).toMatchObject({ state: 'set-aside', guess: { standing: 'assumed' } });
    expect(again.value).toBe(first.value);
    must(await answerFinding(author, id, { ...namedGuess(first.guess), answer: '' }));
    expect(must(await getDraft(author, id)).revision.answers).toEqual([]);
  });

  it('once confirmed is declared in the sheet and assumed no longer', async () => {
    const { guess, value } = await checked();
    await patch({ ...declared, polarisation: guess.changes?.[0]?.value });
    const after = await checked();
    expect(after).toMatchObject({ state: 'confirmed', guess: { standing: 'declared', agrees: true, value: 'plus-plus-i-cross' } });
    expect(after.value).toBeCloseTo(value ?? Number.NaN, 9);
  });

  it('contradicts a declaration until its author keeps that', async () => {
    await patch({ ...declared, polarisation: 'plus-minus-i-cross' });
    const { guess, state } = await checked();
    expect(state).toBe('contradicted');
    must(await answerFinding(author, id, { ...namedGuess(guess), answer: 'It stays as declared.' }));
    expect((await checked()).state).toBe('kept');
  });

  it('is answered by authors alone, and of what the draft has', async () => {
    const other = await desk.person('S. Vasterling');
    const word = { code: 'guess/rotation', where: '/waveforms/A/polarisation', text: 'x', answer: 'Not so.' };
    expect(await answerFinding(other, id, word)).toMatchObject({ ok: false, error: { code: 'not-found' } });
    const long = { ...word, text: '−'.repeat(1500) };
    for (const wrong of [long, { ...word, where: '/waveforms/B/polarisation' }, { ...word, where: '/claims/0' }, { ...word, code: 'guess/weather' }])
      expect(await answerFinding(author, id, wrong)).toMatchObject({ ok: false, error: { code: 'conflict' } });
  });
});
