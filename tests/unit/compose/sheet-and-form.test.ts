import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { claimedFrom, claimedText, settingFrom } from '@/app/(desk)/compose/[id]/claim-fields';
import { readingOf } from '@/app/(desk)/compose/[id]/claimed-reading';
import { composerSchema } from '@/app/(desk)/compose/[id]/composer-schema';
import { emptyNoise, emptyWaveform, fieldsFromSheet, sheetFromFields } from '@/app/(desk)/compose/[id]/fields';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';

const specimens = ['spin-visible', 'precise-match', 'loudness', 'radiated-energy', 'two-to-one', 'ringdown-and-resolution'];
const sheetOf = (name: string): DraftSheet => ({ noise: {}, ...(JSON.parse(readFileSync(`content/specimens/${name}/claim.json`, 'utf8')) as object) }) as DraftSheet;

describe('the form and the sheet', () => {
  it.each(specimens)('%s comes back from the form as it went in', (name) => {
    const sheet = sheetOf(name);
    expect(sheetFromFields(fieldsFromSheet(sheet))).toEqual({ waveforms: sheet.waveforms, noise: sheet.noise, claims: sheet.claims });
  });

  it('carries along what the form has no field for', () => {
    const sheet = { ...sheetOf('spin-visible'), waveforms: { A: { file: 'a.txt', resolution: 0.01, binary: { massRatio: 2, eccentricity: 0.1 } } }, claims: [{ id: 'C1', quantity: 'match', of: { a: 'A' }, claimed: '0.9', note: 'kept' }] };
    const back = sheetFromFields(fieldsFromSheet(sheet));
    expect(back.waveforms['A']).toEqual(sheet.waveforms.A);
    expect(back.claims[0]).toEqual(sheet.claims[0]);
  });

  it('keeps every role of a claim, and a role that nobody knows', () => {
    const of = { em: 'P', gw: 'G', series: 'U', signals: ['s1', 's2'], templates: ['T0'], other: ['x'] };
    const sheet = { ...sheetOf('spin-visible'), claims: [{ id: 'C1', quantity: 'detectable-fraction', of, claimed: '0.65' }] };
    expect(sheetFromFields(fieldsFromSheet(sheet)).claims[0]?.['of']).toEqual(of);
  });

  it('loses no row whose name is empty or taken', () => {
    const fields = { title: '', statement: '', waveforms: [emptyWaveform('A', 'a.txt'), emptyWaveform('A', 'b.txt'), emptyWaveform('', 'c.txt')], noise: [emptyNoise('S')], claims: [] };
    expect(Object.keys(sheetFromFields(fields).waveforms)).toEqual(['A', 'A-2', 'unnamed']);
    const judged = composerSchema.safeParse(fields);
    expect(judged.success ? [] : judged.error.issues.map((i) => i.path.join('.'))).toEqual(['waveforms.2.name', 'waveforms.1.name']);
  });

  it('keeps one inequality for a whole sweep, and a list of values as a list', () => {
    const claim = { id: 'C1', quantity: 'match', of: { a: 'A', b: 'B' }, over: { totalMassMsun: [60, 100] } };
    for (const claimed of [{ above: 0.98 }, ['0.97', '0.98'], [{ above: 0.9 }, '0.98']]) {
      const sheet = { ...sheetOf('spin-visible'), claims: [{ ...claim, claimed }] };
      expect(sheetFromFields(fieldsFromSheet(sheet)).claims[0]?.['claimed']).toEqual(claimed);
    }
  });
});

describe('a claimed value as typed', () => {
  it.each([
    ['0.9984(3)', '0.9984(3)'],
    ['1.50', '1.50'],
    ['> 0.999', { above: 0.999 }],
    ['< 1e-3', { below: 0.001 }],
    ['= 0.5', 0.5],
  ])('%s goes into the sheet with its digits', (typed, expected) => {
    expect(claimedFrom(typed)).toEqual(expected);
    expect(claimedFrom(claimedText(expected))).toEqual(expected);
  });
});

describe('a setting as typed', () => {
  it('takes the type that the setting asks for, and leaves what it cannot read for the check to quote', () => {
    expect(settingFrom('fLowHz', '20')).toBe(20);
    expect(settingFrom('massFrame', 'source')).toBe('source');
    expect(settingFrom('includeEnergyBeforeStart', 'true')).toBe(true);
    expect(settingFrom('maximise', 'time, phase')).toEqual(['time', 'phase']);
    expect(settingFrom('modes', '[[2,2],[2,-2]]')).toEqual([[2, 2], [2, -2]]);
    expect(settingFrom('fLowHz', 'twenty')).toBe('twenty');
    expect(settingFrom('fLowHz', '  ')).toBeUndefined();
  });
});

describe('how a claimed value is read while it is typed', () => {
  it.each([
    ['0.9984(3)', false, '', '0.9984 ± 0.0003, last digit 10⁻⁴'],
    ['1.2e3', false, '', '1200, last digit 10²'],
    ['> 0.98', true, '60; 100', 'above 0.98'],
    ['0.97; 0.98', true, '60; 100', '0.97, last digit 10⁻²; 0.98, last digit 10⁻²'],
  ])('%s', (typed, sweep, over, words) => {
    expect(readingOf(typed, sweep, over)).toBe(words);
  });

  it('says when values and places do not match, and when it is no number', () => {
    expect(readingOf('0.97', true, '60; 100')).toMatch(/1 values? for 2 places/);
    expect(readingOf('0,97', false, '')).toMatch(/^0,97: a number/);
  });
});
