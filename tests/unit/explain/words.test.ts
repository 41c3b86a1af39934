import { describe, expect, it } from 'vitest';
import type { Reading } from '@/lib/explain/candidate';
import { candidateSentence } from '@/lib/explain/words/candidate-sentence';
import { noneSentence } from '@/lib/explain/words/none-sentence';
import { claimedNumber, measuredNumber, percentage } from '@/lib/explain/words/numbers';
import { claimOf } from '@/tests/support/explain-flips';

const reading = (clause: string, more: Partial<Reading> = {}): Reading => ({ conventions: ['C04'], clause, settings: {}, evidence: 'none', evidenceFrom: null, ...more });
const match = claimOf('C1', [{ claimed: 0.9753, value: 0.9185, halfDigit: 5e-5, expandedUncertainty: 9e-4 }], { scale: 'absolute', law: 'distance-from-one' });
const facts = { id: 'x', settings: {}, values: [0.97531], chance: 0.03, tried: 31, standing: 'candidate' as const, odds: 9, explains: [], breaks: [], changes: 1 as const, readings: [reading('the lower cut-off is 30 Hz instead of 20 Hz')] };

describe('a candidate in words', () => {
  it('says what we obtain, what would give the claimed number, how many were tried and how often chance does as well', () => {
    expect(candidateSentence(match, facts)).toBe(
      'With the stated settings we obtain 0.91850 ± 0.00090. The claimed 0.9753 is obtained if the lower cut-off is 30 Hz instead of 20 Hz: 0.97531 ± 0.00090. One reading of 31 single ones tried; a fit as good would arise by chance in 3 % of claims. This is a suggestion for the author, not a finding.',
    );
  });

  it('gives unit and place for a curve, at the point furthest off', () => {
    const curve = claimOf('C1', [{ at: { totalMassMsun: 60 }, claimed: 3591, value: 5078.63, halfDigit: 0.5, expandedUncertainty: 12 }, { at: { totalMassMsun: 100 }, claimed: 6600, value: 6591.25, halfDigit: 0.5, expandedUncertainty: 12 }], { unit: 'Mpc' });
    const sentence = candidateSentence(curve, { ...facts, values: [3591.1, 4660.7] });
    expect(sentence).toContain('we obtain 5079 ± 12 Mpc at a total mass of 60 M☉.');
    expect(sentence).toContain('The claimed 3591 Mpc is obtained, and the other number too, if');
  });

  it('of a class says that the number cannot tell, and lists no more than three', () => {
    const sentence = candidateSentence(match, { ...facts, readings: ['a', 'b', 'c', 'd', 'e'].map((x) => reading(`${x} holds`)) });
    expect(sentence).toContain('if a holds, b holds, c holds or by two other readings:');
    expect(sentence).toContain('The number alone cannot tell which. Five readings of 31 single ones tried;');
    expect(candidateSentence(match, { ...facts, readings: [reading('a holds'), reading('b holds')] })).toContain('if a holds or if b holds:');
  });

  it('quotes what speaks for it and against it', () => {
    const sentence = candidateSentence(match, { ...facts, readings: [reading('a holds', { evidence: 'supports', evidenceFrom: 'noise.txt: “f  ASD”' }), reading('b holds', { evidence: 'contradicts', evidenceFrom: 'statement: “one-sided”' })] });
    expect(sentence).toContain('For it speaks noise.txt: “f  ASD”. Against it speaks statement: “one-sided”.');
  });

  it('give a number that a factor makes the error bar that the factor makes', () => {
    const loud = { ...match, law: 'size' as const, points: [{ ...match.points[0]!, value: 100, claimed: 50, halfDigit: 0.5, expandedUncertainty: 0.4 }] };
    expect(candidateSentence(loud, { ...facts, values: [50], readings: [reading('a holds')] })).toContain('100.00 ± 0.40. The claimed 50 is obtained if a holds: 50.00 ± 0.20.');
  });

  it('say of the data in a sentence of their own what they show, and end it once', () => {
    const sentence = candidateSentence(match, { ...facts, readings: [reading('a holds', { evidence: 'supports', evidenceFrom: 'S holds half of the power of G2.' }), reading('b holds', { evidence: 'supports', evidenceFrom: 'noise.txt: “two-sided”' })] });
    expect(sentence).toContain('The data speak for it: S holds half of the power of G2. For it speaks noise.txt: “two-sided”. ');
  });

  it('never says what somebody did', () => {
    const sentences = [facts, { ...facts, standing: 'coincidence' as const, breaks: ['C2', 'C3'], explains: ['C4'] }].map((one) => candidateSentence(match, one));
    for (const sentence of sentences) {
      expect(sentence).not.toMatch(/author(?:s)? (?:used|took|forgot|made)|mistake|error|wrong|!/i);
      expect(sentence).toContain('suggestion for the author, not a finding');
    }
    expect(sentences[1]).toContain('C4 would agree under it too. C2 and C3, which agree as declared, would not agree under it.');
  });
});

describe('where nothing fits', () => {
  it('the answer is none, with how far the search got', () => {
    expect(noneSentence({ tried: 31, failed: 0, left: 0 })).toBe('None of the 31 readings tried gives the claimed number.');
    expect(noneSentence({ tried: 31, failed: 2, left: 4 })).toBe('None of the 31 readings tried gives the claimed number. Two of them gave no number at all. Four more apply and were not tried.');
    expect(noneSentence({ tried: 0, failed: 0, left: 0 })).toBe('No other reading applies to this claim.');
    expect(noneSentence({ tried: 1, failed: 1, left: 0 })).toBe('The one reading tried does not give the claimed number. No number came of it.');
  });
});

describe('numbers carry their uncertainty', () => {
  it.each([
    [0.9185, 9e-4, '', '0.91850 ± 0.00090'],
    [36.297, 0.0111, '', '36.297 ± 0.012'],
    [140.4, 3, 'km/s', '140.4 ± 3.0 km/s'],
    [8011, 120, 'Mpc', '8011 ± 120 Mpc'],
    [-12.5, 0.2, '', '−12.50 ± 0.20'],
    [9.75e-5, 2e-6, '', '(9.75 ± 0.20) × 10⁻⁵'],
    [0.91843, 2e-7, '', '0.91843000 ± 2.0 × 10⁻⁷'],
    [1e-11, 1e-13, 'M', '(1.000 ± 0.010) × 10⁻¹¹ M'],
    [5, null, '', '5 ± unknown'],
  ])('%s with %s is printed %s%s', (value, uncertainty, unit, text) => {
    expect(measuredNumber(value, uncertainty, unit)).toBe(text);
  });

  it('a claimed number keeps its digits', () => {
    expect([claimedNumber(0.98, 5e-5), claimedNumber(3996, 0.5), claimedNumber(1.2e-15, 5e-17), claimedNumber(0.5, 0), claimedNumber(-2.5, 0.05, 'km/s')]).toEqual(['0.9800', '3996', '1.2 × 10⁻¹⁵', '0.5', '−2.5 km/s']);
  });

  it('a share is never none and never all', () => {
    expect([1 / 2001, 0.004, 0.023, 0.23, 0.0998, 0.999].map(percentage)).toEqual(['less than 0.1 %', '0.4 %', '2.3 %', '23 %', '10 %', 'almost all']);
  });
});
