import { describe, expect, it } from 'vitest';
import { pairPrediction, pairsOf, singlesOf } from '@/lib/explain/search/pairs';
import { claimOf, factorFlip, flipOf } from '@/tests/support/explain-flips';

const low = flipOf('C04:fLowHz=30');
const high = flipOf('C05:fHighHz=512');
const arms = factorFlip('C15:arms-60', 0.866, { common: false });
const sided = factorFlip('C02:louder', Math.SQRT2);
const detectors = factorFlip('C16:2', Math.SQRT2);
const ids = (flips: Parameters<typeof pairsOf>[0]): string[] => pairsOf(flips).map(({ id }) => id);

describe('two flips are tried at once', () => {
  it('where they are of different groups and one of them is met in most comparisons', () => {
    expect(ids([sided, low])).toEqual(['C02:louder + C04:fLowHz=30']);
  });

  it('not where they are of one group', () => {
    expect(ids([low, high])).toEqual([]);
  });

  it('not where both are uncommon, declared and without a word that speaks for them', () => {
    expect(ids([sided, detectors])).toEqual([]);
    expect(ids([sided, { ...detectors, assumed: true }])).toHaveLength(1);
    expect(ids([sided, { ...detectors, evidence: 'supports' }])).toHaveLength(1);
    expect(ids([sided, { ...detectors, evidence: 'contradicts' }])).toEqual([]);
  });

  it('once each, in whatever order they come', () => {
    expect(ids([low, arms, sided])).toEqual(ids([sided, arms, low]));
    expect(singlesOf([low, arms])).toEqual(singlesOf([arms, low]));
  });

  it('never three', () => {
    expect(pairsOf([low, arms, sided, detectors]).every(({ flips }) => flips.length === 2)).toBe(true);
  });
});

describe('a factor and another flip need no rerun together', () => {
  const claim = claimOf('C1', [{ claimed: 1, value: 10 }, { claimed: 1, value: 20 }]);

  it('the numbers of the one are multiplied by the other’s factor, point by point', () => {
    expect(pairPrediction(claim, { values: [20, 40] }, { values: [9, 17] })).toEqual({ values: [18, 34] });
    expect(pairPrediction(claim, { values: [9, 17] }, { values: [10, 10] })).toEqual({ values: [9, 8.5] });
  });

  it('a point without a number stays without one', () => {
    expect(pairPrediction(claim, { values: [20, 40] }, { values: [null, 17] })).toEqual({ values: [null, 34] });
  });

  it('what gives no number gives none together', () => {
    expect(pairPrediction(claim, { values: [20, 40] }, { because: 'it leaves no noise curve' })).toEqual({ because: 'it leaves no noise curve' });
  });
});
