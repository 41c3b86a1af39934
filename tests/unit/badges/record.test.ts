import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildRecord, lapseDay } from '@/lib/badges/build-record';
import { canonicalJson, digestOf } from '@/lib/badges/canonical-json';
import { cautionsFor, RULES_SENTENCE } from '@/lib/badges/cautions';
import { isWatermarked } from '@/lib/badges/demonstration';
import { drawRecordId, isRecordId } from '@/lib/badges/record-id';
import { badgeSentence, coversLine } from '@/lib/badges/sentences';
import { submissionWord } from '@/lib/badges/submission-word';
import { watermark } from '@/lib/engine/synthesis/modes-text';
import { claim, point, result } from '../../support/result-documents';
import { recordInputs } from './signed-record';

describe('a record says what was decided on which numbers', () => {
  it('every field of the format is there, and a claim that differs is covered by nothing', () => {
    const differing = claim({ id: 'C2', verdict: 'differs', points: [point({ verdict: 'differs' })] });
    const record = buildRecord(recordInputs({ result: result(claim(), differing) }));
    expect(Object.keys(record)).toEqual(expect.arrayContaining(['format', 'domain', 'id', 'title', 'authors', 'revision', 'enteredAt', 'decision', 'engine', 'claims', 'files', 'resultDigest', 'cautions', 'supersedes', 'keyId', 'logIndex']));
    expect(record.claims.map((c) => [c.id, c.covered])).toEqual([['C1', true], ['C2', false]]);
    expect(record.claims[0]).not.toHaveProperty('candidates');
    expect(record.claims[0]?.points[0]).toMatchObject({ claimed: 0.9889, value: 0.98894, expandedUncertainty: 2e-7, tolerance: 0.00055, verdict: 'agrees' });
    expect(coversLine(record)).toBe('The level covers C1, 1 of the 2 claims of this record. It does not cover C2 (differs).');
    expect(badgeSentence(record)).toMatch(/^Of the 2 claims in .*, 1 follows from its files\.$/);
  });

  it('the digest of a result does not hang on spaces, order or the way a zero is written', () => {
    const again = JSON.parse(JSON.stringify(result(), null, 4)) as object;
    expect(digestOf(Object.fromEntries(Object.entries(again).reverse()))).toBe(digestOf(result()));
    expect(digestOf({ x: -0 })).toBe(digestOf({ x: 0 }));
    expect(digestOf(result(claim({ points: [point({ value: 0.9889400000000001 })] })))).not.toBe(digestOf(result()));
  });

  it('canonical form is a fixed point of parsing', () => {
    fc.assert(fc.property(fc.jsonValue(), (value) => canonicalJson(JSON.parse(canonicalJson(value))) === canonicalJson(value)));
    expect(() => canonicalJson({ x: NaN })).toThrow();
  });

  it.each([
    ['2026-11-28T23:59:59Z', '2028-11-28'],
    ['2024-02-29T12:00:00Z', '2026-02-28'],
    ['2026-01-31T00:00:00Z', '2028-01-31'],
  ])('entered %s lapses %s', (entered, lapses) => expect(lapseDay(new Date(entered))).toBe(lapses));

  it('a record id is short, random and readable', () => {
    let n = 0;
    const id = drawRecordId((size) => n++ % size);
    expect(id).toBe('0123-4567');
    expect(isRecordId(id)).toBe(true);
    expect(['4q7m-2tnd', '4q7m2tnd', '4q7m-2tno', '4Q7m-2tnd', '../x', '4q7m-2tnd\n'].map(isRecordId)).toEqual([true, false, false, false, false, false]);
  });
});

describe('cautions follow from what a record holds', () => {
  const numbersFor = (quantity: string, isDemonstration = false): number[] =>
    cautionsFor({ claims: [claim({ quantity, coverage: { state: 'covered' } })], isDemonstration }).map((c) => c.number);

  it.each([
    ['match', [1, 2, 3, 5, 14, 15]],
    ['distinguishability-snr', [1, 2, 3, 5, 6, 14, 15]],
    ['snr', [1, 2, 3, 14, 15]],
    ['snr-ratio', [1, 2, 3, 8, 14, 15]],
    ['volume-ratio', [1, 2, 3, 7, 8, 14, 15]],
    ['radiated-energy', [1, 2, 3, 9, 14, 15]],
    ['remnant-fit', [1, 2, 3, 11, 14, 15]],
    ['em-energy', [1, 2, 3, 9, 12, 14, 15]],
    ['disc-luminosity', [1, 2, 3, 13, 14, 15]],
  ])('%s', (quantity, numbers) => expect(numbersFor(quantity)).toEqual(numbers));

  it('an unknown uncertainty and demonstration data each bring their own', () => {
    expect(cautionsFor({ claims: [claim()], isDemonstration: true }).map((c) => c.number)).toEqual([1, 2, 3, 5, 10, 14, 15, 16]);
    expect(RULES_SENTENCE).toMatch(/rules of your journal or collaboration/);
  });

  it('the generator’s watermark is seen where it stands, and nowhere else', () => {
    expect(isWatermarked(Buffer.from(`# Larkfield Wave Group\n# ${watermark}\n0 1 2\n`))).toBe(true);
    expect(isWatermarked(Buffer.from('# a simulation, for demonstration\n0 1 2\n'))).toBe(false);
  });
});

describe('one word for all claims', () => {
  it.each([
    [['agrees', 'agrees'], 'all agree'],
    [['agrees', 'differs'], 'some agree'],
    [['agrees', 'unsettled'], 'some agree'],
    [['differs', 'unsettled'], 'none agrees'],
    [['unsettled', 'not-computable'], 'unsettled'],
  ] as const)('%j: %s', (verdicts, word) => expect(submissionWord(verdicts)).toBe(word));
});
