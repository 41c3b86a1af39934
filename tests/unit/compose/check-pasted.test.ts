import { describe, expect, it } from 'vitest';
import { catalogueRows } from '@/app/(desk)/compose/[id]/catalogue-rows';
import { asSweep, cellProblems } from '@/app/(desk)/compose/[id]/check-pasted';
import { claimFromFields, emptyClaim, type ClaimFields } from '@/app/(desk)/compose/[id]/claim-fields';
import { pasteClaims } from '@/app/(desk)/compose/[id]/paste-claims';

const catalogue = catalogueRows();
const room = { catalogue, waveforms: ['A', 'B'], noise: ['S'] };
const settings = [...new Set(catalogue.flatMap((q) => q.settings.map((s) => s.name as string)))];
const like: ClaimFields = { ...emptyClaim([]), a: 'A', b: 'B', noise: 'S' };
const pasted = (text: string) => pasteClaims(text, [], settings, like).claims;
const problemsOf = (text: string) => pasted(text).map((claim) => cellProblems(claim, room));

describe('a pasted cell', () => {
  it('in order has no problem, a bracket and a bound among them', () => {
    expect(problemsOf('quantity\ttotalMassMsun\tclaimed\ttolerance\nmatch\t60\t0.9984(3)\t\nmatch\t100\t> 0.99\t1e-3')).toEqual([{}, {}]);
  });

  it.each([
    ['claimed', 'claimed\n0.99x', /expected a number such as 0\.9984\(3\)/],
    ['claimed', 'claimed;quantity\n0,9984;match', /Write a decimal point/],
    ['quantity', 'quantity;claimed\nbrightness;1', /no quantity; expected one of/],
    ['a', 'a;claimed\nQ;1', /no waveform of this draft/],
    ['noise', 'noise;claimed\nT;1', /no noise curve of this draft/],
    ['totalMassMsun', 'totalMassMsun;claimed\nheavy;1', /no number; expected totalMassMsun in M☉/],
    ['totalMassMsun', 'totalMassMsun;claimed\n0.001;1', /outside the range of totalMassMsun/],
    ['tolerance', 'tolerance;claimed\n-1;1', /no tolerance/],
    ['massFrame', 'massFrame;claimed\nlab;1', /expected one of detector, source/],
  ])('of %s says what is wrong with it: %j', (column, text, words) => {
    expect(Object.keys(problemsOf(text)[0] ?? {})).toEqual([column]);
    expect(problemsOf(text)[0]?.[column]).toMatch(words);
  });
});

describe('rows that differ in one setting alone', () => {
  it('are one claim over that setting, with every digit as it was printed', () => {
    const sweep = asSweep(pasted('totalMassMsun,claimed\n60,0.9753(2)\n100,0.9959\n200,0.99320'), catalogue);
    expect(sweep && claimFromFields(sweep)).toMatchObject({ over: { totalMassMsun: [60, 100, 200] }, claimed: ['0.9753(2)', '0.9959', '0.99320'] });
    expect(sweep && cellProblems(sweep, room)).toEqual({});
  });

  it('but for a faulty value still are, and the problem stays in sight', () => {
    const sweep = asSweep(pasted('totalMassMsun,claimed\n60,0.9\nheavy,0.8'), catalogue);
    expect(Object.keys(sweep ? cellProblems(sweep, room) : {})).toEqual(['totalMassMsun']);
  });

  it('are none where two things differ, where nothing does, or where the setting cannot be swept', () => {
    for (const text of ['totalMassMsun,fLowHz,claimed\n60,20,1\n100,30,1', 'totalMassMsun,claimed\n60,1\n60,2', 'massFrame,claimed\ndetector,1\nsource,2', 'totalMassMsun,claimed\n60,1']) expect(asSweep(pasted(text), catalogue)).toBeNull();
  });
});
