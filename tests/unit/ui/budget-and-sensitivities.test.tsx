import { createElement, type ReactElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { BudgetTable } from '@/app/_ui/claim/budget-table';
import { MetricBoundLine } from '@/app/_ui/claim/metric-bound';
import { SensitivityTable } from '@/app/_ui/claim/sensitivity-table';
import type { ResultClaim, ResultSensitivity } from '@/lib/pipeline/result';
import { claim } from '@/tests/support/result-documents';

const text = (element: ReactElement): string => renderToStaticMarkup(element).replace(/<[^>]+>/g, ' ').replace(/\s+/g, ' ');
const total = { u: 0.01, degreesOfFreedom: null, coverageFactor: 2, expanded: 0.02, missing: [] };
const budget: ResultClaim['budget'] = [
  { id: 'E01', component: 'Quadrature', group: 'computation', u: 1e-7, note: 'steps halved', share: 0 },
  { id: 'E05', component: 'Simulation truncation error', group: 'coverage', u: 0.01, note: 'three runs', share: 1, degreesOfFreedom: 2 },
  { id: 'E06', component: 'Extraction radius', group: 'coverage', u: null, note: 'Not available: one radius.', share: null },
];

describe('the budget', () => {
  it('of a result of earlier versions, without totals, still has its sum', () => {
    expect(text(createElement(BudgetTable, { claim: claim({ budget: budget.map(({ share: _, degreesOfFreedom: __, ...line }) => line) }) }))).toContain('Known part, k = 2');
  });

  it('tells factor, degrees of freedom and interval of what is known, and that it is not all', () => {
    const data = { ...total, degreesOfFreedom: 2.01, coverageFactor: 4.5265, expanded: 0.045265, interval: { low: 0, high: 0.0512 }, missing: ['Extraction radius'] };
    const shown = text(createElement(BudgetTable, { claim: claim({ budget, uncertainty: { computation: total, data } }) }));
    expect(shown).toContain('All known lines, k = 4.53');
    expect(shown).toContain('2.0 effective degrees of freedom');
    expect(shown).toContain('By draws, 95 %');
    expect(shown).toContain('not available, not zero');
  });
});

describe('sensitivities', () => {
  const row = (over: Partial<ResultSensitivity>): ResultSensitivity => ({ setting: 'fLowHz', standing: 'assumed', unit: 'Hz', used: 20, tried: 22, value: 0.98, change: -0.001, inTolerances: -2, ...over });
  const shown = (...rows: ResultSensitivity[]): string => text(createElement(SensitivityTable, { claim: claim({ sensitivities: rows }) }));

  it('stand in a table with used, tried, change and tolerances, each with its unit', () => {
    const words = shown(row({}));
    for (const part of ['Lower cut-off assumed', '20 Hz', '22 Hz', '−2.0 T', 'By a tolerance T or more: Lower cut-off.']) expect(words).toContain(part);
  });

  it('say of what gave no number that it did not, and of small ones that none moves by a tolerance', () => {
    const words = shown(row({ value: null, change: null, inTolerances: null, because: 'cannot be computed so' }), row({ inTolerances: 0.3 }));
    expect(words).toContain('no number cannot be computed so');
    expect(words).toContain('None of these steps');
  });

  it('below what the computation can tell are said to be so, without digits', () => {
    const words = text(createElement(SensitivityTable, { claim: claim({ sensitivities: [row({ change: 1e-12, inTolerances: 1e-9 })], uncertainty: { computation: total, data: total } }) }));
    expect(words).toContain('by less than U');
    expect(words).not.toContain('10 −12');
  });
});

describe('the metric bound', () => {
  it('names both ends, what it rests on and what is missing', () => {
    const bound = { low: 0.9091, high: 0.9133, knownTo: [{ waveform: 'A', relative: 'A2', by: 'resolution' as const, mismatch: 1e-4 }], missing: ['radius of A'] };
    const words = text(createElement(MetricBoundLine, { bound, unit: '' }));
    expect(words).toContain('A and A2, which differ in resolution, have a mismatch of');
    expect(words).toContain('radius of A; the bound can only be wider');
  });

  it('is not available, never zero, where no waveform has another run', () => {
    expect(text(createElement(MetricBoundLine, { bound: { low: null, high: null, knownTo: [], missing: ['resolution of A'] }, unit: '' }))).toContain('not available, not zero');
  });
});
