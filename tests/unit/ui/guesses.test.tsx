import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { guessAsNow } from '@/app/(desk)/compose/[id]/guess-as-now';
import { GuessTable } from '@/app/_ui/claim/guess-table';
import { confidenceWords } from '@/app/_ui/claim/guess-words';
import { answeredGuesses } from '@/app/views/answered-guesses';
import { namedGuess } from '@/lib/pipeline/guesses/guess-state';
import type { SheetGuess } from '@/lib/pipeline/guesses/sheet-guess';

const rotation: SheetGuess = {
  about: 'rotation', part: 'waveforms', name: 'A/1', field: '/waveforms/A~11/polarisation', standing: 'assumed', value: 'plus-minus-i-cross', agrees: false, proposed: 'the other sense',
  changes: [{ field: '/waveforms/A~11/polarisation', value: 'plus-plus-i-cross' }], reason: 'arg H₂₂ turns by 0.2 rad a sample.', confidence: 0.95, convention: { id: 'C22', title: 'Sense of rotation', sentence: 'It turns.' },
};
const column: SheetGuess = { ...rotation, about: 'noise-column', part: 'noise', name: 'S', field: '/noise/S/columns', standing: 'declared', value: 'f psd', proposed: 'asd', changes: [{ field: '/noise/S/columns', value: ['f', 'asd'] }], convention: null };
const sheet = (A: object, S: object = { columns: ['f', 'psd'] }) => ({ waveforms: { 'A/1': A }, noise: { S } });

describe('a guess beside the form as it stands now', () => {
  it('stays as it was while the word does', () => {
    expect(guessAsNow(rotation, sheet({}))).toBe(rotation);
    expect(guessAsNow(column, sheet({}))).toBe(column);
  });

  it('is confirmed at once where the sheet says it', () => {
    expect(guessAsNow(rotation, sheet({ polarisation: 'plus-plus-i-cross' }))).toMatchObject({ standing: 'declared', agrees: true, value: 'plus-plus-i-cross' });
    expect(guessAsNow(column, sheet({}, { columns: ['f', 'asd'] }))).toMatchObject({ agrees: true, value: 'f asd' });
  });

  it('is gone where the sheet says a third thing, or has no such waveform', () => {
    expect(guessAsNow(rotation, sheet({ polarisation: 'plus-minus-i-cross' }))).toBeNull();
    expect(guessAsNow(column, sheet({}, { columns: ['f', '_', 'psd'] }))).toBeNull();
    expect(guessAsNow(rotation, { waveforms: {}, noise: {} })).toBeNull();
  });
});

describe('guesses on a desk', () => {
  const drawn = (guesses: readonly SheetGuess[], answers: Parameters<typeof answeredGuesses>[1] = []) => renderToStaticMarkup(<GuessTable guesses={answeredGuesses(guesses, answers)} />);

  it('tell what is assumed, contradicted, set aside and kept', () => {
    expect(drawn([rotation, column])).toMatch(/assumed, not confirmed.*the data contradict it/s);
    const answers = [{ ...namedGuess(rotation), answer: 'Not so.' }, { ...namedGuess(column), answer: 'It stays as declared.' }];
    expect(drawn([rotation, column], answers)).toMatch(/set the guess aside.*Not so\..*kept by the authors.*It stays as declared\./s);
    expect(drawn([rotation], [{ ...namedGuess({ ...rotation, proposed: 'as declared' }), answer: 'Not so.' }])).toContain('assumed, not confirmed');
  });

  it('fold away what the data bear out, and are silent without guesses', () => {
    expect(drawn([{ ...column, agrees: true }])).toMatch(/Nothing contradicts.*<details.*1 declaration that the data bear out/s);
    expect(drawn([])).toBe('');
    expect(answeredGuesses(undefined, [])).toEqual([]);
  });

  it('say a confidence in words and as a number', () => {
    expect([0.95, 0.75, 0.6, 0.5].map(confidenceWords)).toEqual(['almost sure, 0.95', 'likely, 0.75', 'more likely than not, 0.60', 'as likely as not, 0.50']);
  });
});
