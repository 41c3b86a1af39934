import { describe, expect, it } from 'vitest';
import { isEmptySheet, mergeSheets, readClaimJson } from '@/app/(desk)/compose/[id]/import-sheet';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';

const draft: DraftSheet = { format: 'counterfoil-claim/1', title: 'Mine', statement: '', waveforms: { A: { file: 'a.txt' } }, noise: { S: { file: 's.txt' } }, claims: [{ id: 'C1', of: { a: 'A' }, noise: 'S', claimed: '0.9' }] };
const empty: DraftSheet = { ...draft, title: '', waveforms: {}, noise: {}, claims: [] };

describe('a claim.json that is added to a draft', () => {
  it('changes nothing that is there; what comes under a taken name takes another, and its claims follow', () => {
    const incoming = { ...draft, title: 'Theirs', statement: 'Why', waveforms: { A: { file: 'other.txt' }, B: { file: 'b.txt' } }, noise: { S: { file: 's.txt' } }, claims: [{ id: 'C1', of: { a: 'A', b: 'B' }, noise: 'S', claimed: '0.8' }] };
    const { sheet, renamed } = mergeSheets(draft, incoming);
    expect(sheet).toEqual({ ...draft, statement: 'Why', waveforms: { A: { file: 'a.txt' }, 'A-2': { file: 'other.txt' }, B: { file: 'b.txt' } }, claims: [...draft.claims, { id: 'C1-2', of: { a: 'A-2', b: 'B' }, noise: 'S', claimed: '0.8' }] });
    expect(renamed).toEqual(['waveform A is now A-2', 'claim C1 is now C1-2']);
  });

  it('twice is once', () => {
    const { sheet, renamed } = mergeSheets(draft, draft);
    expect([sheet, renamed]).toEqual([draft, []]);
  });

  it('into an empty draft is the sheet itself', () => {
    expect(isEmptySheet(empty)).toBe(true);
    expect(isEmptySheet(draft)).toBe(false);
    expect(mergeSheets(empty, draft).sheet).toEqual(draft);
  });
});

describe('the text of a claim.json', () => {
  it('is read with what it leaves out as empty', () => {
    const read = readClaimJson('{"format":"counterfoil-claim/1","title":"T"}');
    expect(read).toEqual({ ok: true, value: { ...empty, title: 'T' } });
  });

  it.each([
    ['{"format":"counterfoil-claim/1",}', /line 1, column/],
    ['{"format":"another/1"}', /counterfoil-claim\/1/],
    ['{"format":"counterfoil-claim/1","claims":{}}', /\/claims/],
    ['[]', /claim\.json/],
  ])('%s is refused with its place', (text, words) => {
    const read = readClaimJson(text);
    expect(read.ok ? 'read' : read.error.join(' ')).toMatch(words);
  });
});
