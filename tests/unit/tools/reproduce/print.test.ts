import { describe, expect, it } from 'vitest';
import { brief, withUncertainty } from '@/lib/tools/reproduce/print-numbers';
import { printResult } from '@/lib/tools/reproduce/print-result';
import type { ResultClaim, ResultDocument } from '@/lib/pipeline/result';

describe('a number for people', () => {
  it.each([
    [0.918533333, 0.00020001, '0.91853 ± 0.0002'],
    [36.2999, 0.0123, '36.300 ± 0.012'],
    [3995.637, 12.3, '3996 ± 12'],
    [1.234567e-15, 2e-18, '1.2346e-15 ± 2.0e-18'],
    [0.5, 1e-14, '0.5000000000 ± 1.0e-14'],
    [0, 0.1, '0 ± 0.1'],
    [0.25, null, '0.2500000000 ± not known'],
    [null, 0.1, '—'],
  ])('%s with U = %s reads %s', (value, uncertainty, text) => {
    expect(withUncertainty(value, uncertainty)).toBe(text);
  });

  it('is brief where only its size matters', () => {
    expect([0.00055, 1234.5, 1.26e-9, 0, null].map(brief)).toEqual(['0.00055', '1200', '1.3e-9', '0', '—']);
  });
});

describe('a result as a table', () => {
  const claim: ResultClaim = {
    id: 'C1', quantity: 'match', unit: '', verdict: 'differs', remarks: ['narrower scope: holds at 1 of 2 points (totalMassMsun 100)'],
    coverage: { state: 'unknown', missing: ['resolution'] },
    points: [
      { at: { totalMassMsun: 60 }, claimed: 0.9753, printed: '0.9753', tolerance: 0.00055, value: 0.918533, expandedUncertainty: 2e-4, routes: { A: 0.918533, B: 0.918534 }, apart: -0.0568, verdict: 'differs' },
      { at: { totalMassMsun: 100 }, claimed: { above: 0.98 }, printed: '> 0.98', tolerance: null, value: 0.9889, expandedUncertainty: 2e-4, routes: { A: 0.9889, B: 0.9889 }, apart: 0.0089, verdict: 'agrees' },
    ],
    budget: [], assumed: ['fHighHz'], settings: [{ name: 'fHighHz', value: 2048, standing: 'assumed', unit: 'Hz' }], routeB: [0, 1],
    findings: [{ code: 'engine/signal-starts-in-band', level: 'needs-answer', text: 'The signal starts at 32 Hz.', where: 'A', fix: 'Raise the lower edge.' }],
    candidates: [],
  };
  const result: ResultDocument = { format: 'counterfoil-result/1', engine: '1.0.0', title: 'Spin is visible', files: [], claims: [claim] };

  it('says what the files say against the words beside them, and nothing of what they bear out', () => {
    const guess = { about: 'rotation', part: 'waveforms', name: 'A', field: '/waveforms/A/polarisation', standing: 'assumed', value: 'plus-minus-i-cross', agrees: false, proposed: 'the other sense', changes: null, reason: 'It turns by 0.2 rad a sample.', confidence: 0.95, convention: null } as const;
    expect(printResult({ ...result, guesses: [guess] })).toContain('\n  /waveforms/A/polarisation (assumed: plus-minus-i-cross): the other sense, confidence 0.95. It turns by 0.2 rad a sample.\n');
    expect(printResult({ ...result, guesses: [{ ...guess, agrees: true }] })).toBe(printResult(result));
  });

  it('shows claimed and recomputed side by side, with uncertainty, tolerance, verdict, and what to do next', () => {
    expect(printResult(result)).toBe(`Spin is visible  (engine 1.0.0)

C1  match: differs
  totalMassMsun   claimed   recomputed ± U     T         verdict
  60              0.9753    0.91853 ± 0.0002   0.00055   differs
  100             > 0.98    0.98890 ± 0.0002   —         agrees
  Remark: narrower scope: holds at 1 of 2 points (totalMassMsun 100)
  Stated uncertainty: unknown (not available: resolution)
  Assumed: fHighHz = 2048 Hz
  Needs an answer: The signal starts at 32 Hz. [engine/signal-starts-in-band, A]
    Next: Raise the lower edge.

No claim agrees.
`);
  });
});
