import { describe, expect, it } from 'vitest';
import { settingFrom, claimFromFields, fieldsFromClaim } from '@/app/(desk)/compose/[id]/claim-fields';
import { claimSheetJsonSchema } from '@/lib/claims/json-schemas';
import { parseClaimSheet } from '@/lib/claims/parse-sheet';
import { formatProblem } from '@/lib/kernel/problem';
import { catalogue } from '@/lib/pipeline/catalogue';

type Json = Record<string, unknown>;
const columns = ['t', 're22', 'im22'];
const sheet = (claim: Json): Json => ({
  format: 'counterfoil-claim/1',
  title: 'Two runs',
  waveforms: { A: { file: 'a.txt', columns }, B: { file: 'b.txt', columns } },
  claims: [{ id: 'C1', quantity: 'phase-difference', of: { a: 'A', b: 'B' }, claimed: '0.05', ...claim }],
});
const read = (claim: Json) => parseClaimSheet(sheet(claim), catalogue);
const problems = (claim: Json): string => {
  const parsed = read(claim);
  return parsed.ok ? '' : parsed.error.map(formatProblem).join('\n');
};

describe('a setting that is a word or one named number', () => {
  it.each([
    { alignment: 'window', window: [50, 200], at: 'peak' },
    { alignment: 'peak', at: 'maximum' },
    { alignment: 'none', at: { timeM: -12.5 } },
    { alignment: { frequencyM: 0.1 }, at: { frequencyM: 0.3 } },
  ])('reads %j as it stands', (settings) => {
    const parsed = read({ settings });
    if (!parsed.ok) throw new Error(problems({ settings }));
    expect(parsed.value.claims.map((claim) => claim.settings)).toEqual([settings]);
  });

  it.each([
    [{ alignment: 'both' }, '/claims/0/settings/alignment: saw "both"; expected one of "window", "peak", "none", or {"frequencyM": number above 0}'],
    [{ alignment: { frequencyM: 0 } }, 'expected one of "window", "peak", "none", or {"frequencyM": number above 0}'],
    [{ at: { timeM: 1, frequencyM: 1 } }, 'expected one of "peak", "end", "window", "maximum", or {"timeM": number} or {"frequencyM": number above 0}'],
    [{ at: 100 }, '/claims/0/settings/at: saw 100'],
    [{ window: [200, 50] }, 'from < to'],
    [{ inclinationRad: 0.3 }, 'expected a setting of phase-difference: modes, alignment, window, at'],
  ])('refuses %j and says what it takes', (settings, sentence) => {
    expect(problems({ settings })).toContain(sentence);
  });
  it('takes no noise curve, and needs both records', () => {
    expect(problems({ noise: 'S' })).toContain('no noise curve for phase-difference');
    expect(problems({ of: { a: 'A' } })).toContain('a waveform of this sheet as "b" of phase-difference');
  });
});

describe('a sweep over a place', () => {
  it('goes over its named number', () => {
    const parsed = read({ over: { at: [{ timeM: 100 }, { timeM: 250.5 }] }, claimed: ['0.01', '0.02'] });
    if (!parsed.ok) throw new Error('refused');
    expect(parsed.value.claims.map((claim) => claim.over)).toEqual([{ setting: 'at', values: [100, 250.5] }]);
  });
  it.each([[['peak', 'end']], [[100, 200]], [[{ frequencyM: 0.1 }, { frequencyM: 0.2 }]]])('refuses %j', (values) => {
    expect(problems({ over: { at: values }, claimed: ['0.01', '0.02'] })).toContain('expected {"timeM": number} in each entry');
  });
  it('is refused for what no sweep may change', () => {
    expect(problems({ over: { window: [[1, 2], [2, 3]] }, claimed: [1, 1] })).toContain('a sweep over one of at');
  });
  it('is published so in the JSON Schema', () => {
    const text = JSON.stringify(claimSheetJsonSchema(catalogue));
    expect(text).toMatch(/"over":\{"anyOf":\[.*"at":\{"minItems":1,"type":"array","items":\{[^[\]]*"timeM":\{"type":"number"\}/);
  });
  it('can be typed as numbers in the form, and comes back as it went in', () => {
    expect(settingFrom('at', '100')).toEqual({ timeM: 100 });
    expect(settingFrom('at', 'peak')).toBe('peak');
    expect(settingFrom('alignment', '{"frequencyM":0.1}')).toEqual({ frequencyM: 0.1 });
    const claim = { id: 'C1', quantity: 'phase-difference', of: { a: 'A', b: 'B' }, over: { at: [{ timeM: 100 }, { timeM: 200 }] }, claimed: ['0.01', '0.02'] };
    expect(claimFromFields(fieldsFromClaim(claim))).toEqual(claim);
    expect(claimFromFields({ ...fieldsFromClaim(claim), overValues: '100; 200' })).toEqual(claim);
  });
});
