import { describe, expect, it } from 'vitest';
import { anchoredText } from '@/app/views/anchored-text';
import { decisionOf } from '@/app/views/decision-as-view';
import type { DecisionView } from '@/lib/services/reviews/decision-view';

const decided = (change: Partial<DecisionView>): DecisionView => ({
  id: 'd', kind: 'back-with-author', round: 1, revision: 1, by: 'I. Corvane', at: '2026-05-01T10:00:00Z', level: null, remarks: [], covers: [],
  letter: { numbers: [], points: [], prose: '' }, publicSentence: '', signing: { state: 'not-needed' }, ...change,
});

describe('what the editor decided', () => {
  const back = decided({});
  const entered = decided({ kind: 'enter', revision: 2, at: '2026-06-01T10:00:00Z', level: 1, covers: ['C1'], remarks: ['scope narrowed'], signing: { state: 'signed', recordId: '00aa-0000' } });

  it('is the last word on the revision that is read', () => {
    expect(decisionOf([back, entered], 1)).toMatchObject({ title: 'Back with author', by: 'I. Corvane', note: null });
    expect(decisionOf([back, entered], 2)).toMatchObject({ title: 'Entered at level 1', coveredClaims: ['C1'], remarks: ['scope narrowed'] });
    expect(decisionOf([back, { ...back, at: '2026-05-02T10:00:00Z', kind: 'set-aside' }], 1)?.title).toBe('Set aside');
    expect(decisionOf([back], 2)).toBeNull();
  });
  it('says while there is no signature yet', () => {
    expect(decisionOf([{ ...entered, signing: { state: 'waiting' } }], 2)?.title).toBe('Entered at level 1, not signed yet');
  });
});

describe('the number that a thread hangs on', () => {
  it('carries unit and uncertainty, or says that they were not kept', () => {
    expect(anchoredText({ printed: '36.3', value: 36.29712, expandedUncertainty: 0.0113, unit: 'Mpc' })).toBe('36.297 ± 0.012 Mpc');
    expect(anchoredText({ printed: '0.9889', value: 0.9885 })).toBe('0.9885 ± unknown');
    expect(anchoredText({ printed: '0.9889', value: null })).toBe('not computable');
    expect(anchoredText({ printed: null, value: null })).toBe('several numbers');
  });
});
