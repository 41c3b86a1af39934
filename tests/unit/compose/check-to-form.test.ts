import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { differences } from '@/app/(desk)/compose/[id]/differences';
import { fieldsFromSheet, sheetFromFields } from '@/app/(desk)/compose/[id]/fields';
import { fixesOf } from '@/app/(desk)/compose/[id]/fixes';
import { placeOf } from '@/app/(desk)/compose/[id]/problem-place';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';

const sheet = JSON.parse(readFileSync('content/specimens/spin-visible/claim.json', 'utf8')) as DraftSheet;
const fields = fieldsFromSheet(sheet);

describe('a problem of the sheet', () => {
  it.each([
    ['/claims/0/settings/fLowHz', 'claims.0.settings.fLowHz', 'Claim C1, fLowHz'],
    ['/claims/0/of/b', 'claims.0.b', 'Claim C1, waveform b'],
    ['/claims/0/claimed/2', 'claims.0.claimed', 'Claim C1, claimed'],
    ['/claims/0/over/totalMassMsun/1', 'claims.0.overValues', 'Claim C1, values of totalMassMsun'],
    ['/waveforms/B/binary/chi1z', 'waveforms.1.chi1z', 'Waveform B, chi1z'],
    ['/waveforms/B/columns/2', 'waveforms.1.columns', 'Waveform B, columns'],
    ['/noise/S/curve', 'noise.0.curve', 'Noise curve S, curve'],
    ['a.txt:4127', null, 'a.txt:4127'],
  ])('at %s leads to its field', (where, field, words) => {
    expect(placeOf(where, fields)).toEqual({ field, words });
  });

  it('finds a name that the pointer has to escape', () => {
    const odd = fieldsFromSheet({ ...sheet, waveforms: { 'a/b~c': { file: 'a.txt' } } });
    expect(placeOf('/waveforms/a~1b~0c/file', odd).field).toBe('waveforms.0.file');
  });
});

describe('a step that a finding names', () => {
  it('sets the band edge on the claim that has it', () => {
    expect(fixesOf({ where: 'S', fix: 'Set fLowHz to 10.5 Hz or more, or attach a curve that reaches lower.' }, 'C1', fields)).toEqual([{ words: 'Set fLowHz to 10.5 Hz, for C1', field: 'claims.0.settings.fLowHz', value: '10.5' }]);
  });

  it('offers each way to treat negative m on the very waveform', () => {
    const fixes = fixesOf({ where: 'B', fix: 'Declare negativeM: "mirror", "given" or "none".' }, 'C1', fields);
    expect(fixes.map((f) => [f.field, f.value])).toEqual(['mirror', 'given', 'none'].map((v) => ['waveforms.1.negativeM', v]));
  });

  it('offers nothing where only the author can act', () => {
    expect(fixesOf({ where: 'A', fix: 'Attach a longer record.' }, 'C1', fields)).toEqual([]);
    expect(fixesOf({ where: 'A' }, 'C1', fields)).toEqual([]);
    expect(fixesOf({ where: 'S', fix: 'Set fLowHz to 10 Hz or more.' }, 'C9', fields)).toEqual([]);
  });
});

describe('two versions of a draft', () => {
  const mine = { ...sheetFromFields(fields), title: sheet.title, statement: sheet.statement };

  it('differ nowhere when they say the same in another order', () => {
    const turned = Object.fromEntries(Object.entries(sheet.waveforms).reverse().map(([n, w]) => [n, Object.fromEntries(Object.entries(w).reverse())]));
    expect(differences(mine, { ...sheet, waveforms: turned })).toEqual([]);
  });

  it('are set side by side part by part, also where one has no such part', () => {
    const rows = differences(mine, { ...sheet, title: 'Another', noise: { ...sheet.noise, T: { curve: 'G2' } }, claims: [] });
    expect(rows.map((r) => [r.part, r.mine === null, r.theirs === null])).toEqual([['Title', false, false], ['Noise curve T', true, false], ['Claim C1', false, true]]);
  });
});
