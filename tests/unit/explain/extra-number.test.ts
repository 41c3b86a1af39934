import { describe, expect, it } from 'vitest';
import { extraNumber, type ClaimOnGrid, type ReadingOnGrid } from '@/lib/explain/search/extra-number';

const on = (candidate: string | null, values: (number | null)[], clause = candidate === null ? '' : `${candidate} holds`): ReadingOnGrid => ({ candidate, clause, values, expandedUncertainties: values.map((y) => (y === null ? null : 1e-5)) });

/** Independent derivation of the figures: domain reference 3.2, matches of the demonstration pair with f_l = 20 and 30 Hz. */
const declared = on(null, [0.9185, 0.9889, 0.9937]);
const low = on('f30', [0.9753, 0.9959, 0.9932], 'the lower cut-off is 30 Hz');
const claim: ClaimOnGrid = { title: 'Match', unit: '', scale: 'absolute', tolerance: 5e-4, setting: 'totalMassMsun', settingUnit: 'M☉', grid: [60, 100, 200], stated: [], readings: [declared, low] };

describe('the one extra number', () => {
  it('is asked for where the readings differ most in units of what cannot be told', () => {
    const found = extraNumber(claim)!;
    expect(found).toMatchObject({ setting: 'totalMassMsun', at: 60, unit: 'M☉', predictions: [{ candidate: null, value: 0.9185 }, { candidate: 'f30', value: 0.9753 }] });
    expect(found.apart).toBeCloseTo(0.0568 / (5e-4 + Math.SQRT2 * 1e-5), 0);
    expect(found.sentence).toBe('Match at a total mass of 60 M☉ would tell these apart: 0.918500 ± 1.0 × 10⁻⁵ with the stated settings and 0.975300 ± 1.0 × 10⁻⁵ if the lower cut-off is 30 Hz. Could you state the number that you find there?');
  });

  it('is none that the claim states already', () => {
    expect(extraNumber({ ...claim, stated: [60] })!.at).toBe(100);
  });

  it('tells all candidates apart where one place does', () => {
    const other = on('other', [0.9752, 0.98, 0.9932]);
    expect(extraNumber({ ...claim, readings: [declared, low, other] })!.at).toBe(100);
  });

  it('tells the first two apart where no place does all', () => {
    const twin = on('twin', [0.9753, 0.9959, 0.9932]);
    const second = on('second', [0.96, 0.9959, 0.9932]);
    expect(extraNumber({ ...claim, readings: [declared, low, second, twin] })).toMatchObject({ at: 60 });
  });

  it('is missing where nothing tells them apart, and where there is no candidate', () => {
    expect(extraNumber({ ...claim, readings: [declared, on('twin', [...declared.values])] })).toBeNull();
    expect(extraNumber({ ...claim, readings: [declared] })).toBeNull();
    expect(extraNumber({ ...claim, readings: [declared, on('fails', [null, null, null])] })).toBeNull();
  });

  it('looks at the logarithm where the claim is weighed so', () => {
    const inLog = { ...claim, scale: 'ln' as const, tolerance: 0.1, readings: [on(null, [1, 100]), on('x', [2, 140])], grid: [1, 2] };
    expect(extraNumber(inLog)!.at).toBe(1);
  });
});
