import { describe, expect, it } from 'vitest';
import { parseClaimed, type Claimed } from '@/lib/claims/claimed';
import { claimVerdict, decideVerdict, submissionVerdict, type VerdictWord, type Weighing } from '@/lib/verdicts/verdict';

function claimed(raw: unknown): Claimed {
  const parsed = parseClaimed(raw);
  if (!parsed.ok) throw new Error(parsed.error.saw);
  return parsed.value;
}

/** Value, U, A and B of a point against a claim with tolerance 0.1 unless told otherwise. */
function weigh(raw: unknown, value: number | null, uncertainty: number | null, more: Partial<Weighing> & { A?: number | null; B?: number | null } = {}) {
  const { A = value, B = value, ...rest } = more;
  return decideVerdict({
    claimed: claimed(raw), measured: { value, expandedUncertainty: uncertainty, routes: { A, B } }, routeBRan: true,
    scale: 'absolute', declaredTolerance: 0.1, naturalTolerance: (x) => 0.01 * x, stopped: false, ...rest,
  });
}

describe('the verdict on a value', () => {
  it.each<[string, number, number, VerdictWord]>([
    ['d + U just within T', 1.06, 0.03, 'agrees'],
    ['d alone within T, but not with U', 1.08, 0.03, 'unsettled'],
    ['d alone beyond T, but not without U', 1.12, 0.03, 'unsettled'],
    ['d − U beyond T', 1.14, 0.03, 'differs'],
    ['the same on the other side', 0.86, 0.03, 'differs'],
    ['U larger than T', 1, 0.2, 'unsettled'],
    ['no uncertainty at all', 1, 0, 'agrees'],
  ])('%s', (_, value, uncertainty, word) => {
    expect(weigh(1, value, uncertainty).word).toBe(word);
  });

  it('takes half a unit of the last printed digit into T, and nothing for a JSON number', () => {
    expect(weigh('1.0', 1.13, 0).tolerance).toBeCloseTo(0.15, 15);
    expect(weigh('1.0', 1.13, 0).word).toBe('agrees');
    expect(weigh(1, 1.13, 0)).toMatchObject({ word: 'differs', tolerance: 0.1 });
  });

  it('takes the natural tolerance at the claimed value when none is declared', () => {
    expect(weigh(50, 50.4, 0.05, { declaredTolerance: null })).toMatchObject({ word: 'agrees', tolerance: 0.5 });
  });

  it('tells how far recomputed and claimed are apart, with its sign', () => {
    expect(weigh(1, 0.75, 0).apart).toBe(-0.25);
  });

  it('does not let the stated uncertainty change it', () => {
    expect(weigh('1.00(50)', 1.3, 0)).toMatchObject({ word: 'differs' });
  });
});

describe('routes', () => {
  it('that lie further apart than T/4 and U disagree, before anything is said about the claim', () => {
    expect(weigh(1, 1, 0.001, { B: 1.03 }).word).toBe('routes-disagree');
    expect(weigh(1, 1, 0.001, { B: 1.02 }).word).toBe('agrees');
    expect(weigh(1, 2, 0.05, { B: 2.04 }).word).toBe('differs');
  });

  it('of which the second did not run at this point say nothing', () => {
    expect(weigh(1, 1, 0.001, { B: null, routeBRan: false }).word).toBe('agrees');
  });

  it('of which one should have run and gave nothing decide nothing', () => {
    expect(weigh(1, 1, 0.001, { B: null }).word).toBe('not-computable');
    expect(weigh(1, 1, 0.001, { A: Number.NaN }).word).toBe('not-computable');
  });

  it('of a bound are judged by the natural tolerance at the recomputed value', () => {
    expect(weigh({ above: 1 }, 8, 0.001, { B: 8.03 }).word).toBe('routes-disagree');
    expect(weigh({ above: 1 }, 8, 0.001, { B: 8.01 }).word).toBe('agrees');
  });
});

describe('the verdict on an inequality has no tolerance', () => {
  it.each<[unknown, number, VerdictWord]>([
    [{ above: 1 }, 1.03, 'agrees'],
    [{ above: 1 }, 1.01, 'unsettled'],
    [{ above: 1 }, 0.99, 'unsettled'],
    [{ above: 1 }, 0.97, 'differs'],
    [{ below: 1 }, 0.97, 'agrees'],
    [{ below: 1 }, 0.99, 'unsettled'],
    [{ below: 1 }, 1.03, 'differs'],
  ])('%j recomputed as %s ± 0.02 %s', (raw, value, word) => {
    expect(weigh(raw, value, 0.02)).toMatchObject({ word, tolerance: null });
  });
});

describe('the logarithmic scale', () => {
  const ln = { scale: 'ln' as const, declaredTolerance: 1 };

  it('takes a tolerance of 1 as a factor of two, either way', () => {
    expect(weigh(1e-15, 1.9e-15, 0, ln).word).toBe('agrees');
    expect(weigh(1e-15, 0.55e-15, 0, ln).word).toBe('agrees');
    expect(weigh(1e-15, 2.1e-15, 0, ln)).toMatchObject({ word: 'differs', tolerance: Math.LN2 });
    expect(weigh(1e-15, 2.1e-15, 0, ln).apart).toBeCloseTo(Math.log(2.1), 12);
  });

  it('cannot compare with zero or below', () => {
    expect(weigh(0, 1, 0, ln).word).toBe('not-computable');
    expect(weigh(1, -1, 0, ln).word).toBe('not-computable');
  });
});

describe('what is not a finite number', () => {
  it.each<[string, number | null, number | null, Partial<Weighing>]>([
    ['a value that is NaN', Number.NaN, 0.01, {}],
    ['a value that is infinite', Number.POSITIVE_INFINITY, 0.01, {}],
    ['no value', null, 0.01, {}],
    ['no uncertainty', 1, null, {}],
    ['an uncertainty that is NaN', 1, Number.NaN, {}],
    ['an infinite uncertainty', 1, Number.POSITIVE_INFINITY, {}],
    ['a tolerance that is NaN', 1, 0.01, { declaredTolerance: null, naturalTolerance: () => Number.NaN }],
    ['a finding that stops', 1, 0.01, { stopped: true }],
  ])('%s ends as not computable, for a value and for a bound', (_, value, uncertainty, more) => {
    expect(weigh(1, value, uncertainty, more).word).toBe('not-computable');
    expect(weigh({ above: 0 }, value, uncertainty, more).word).toBe('not-computable');
  });
});

describe('from points to the claim and from claims to the submission', () => {
  it.each<[VerdictWord[], VerdictWord]>([
    [['agrees', 'agrees'], 'agrees'],
    [['agrees', 'unsettled'], 'unsettled'],
    [['unsettled', 'differs', 'agrees'], 'differs'],
    [['differs', 'routes-disagree'], 'routes-disagree'],
    [['routes-disagree', 'not-computable'], 'not-computable'],
    [[], 'not-computable'],
  ])('the worst of %j is %s', (points, word) => {
    expect(claimVerdict(points)).toBe(word);
  });

  it.each<[VerdictWord[], string]>([
    [['agrees', 'agrees'], 'all-agree'],
    [['agrees', 'differs'], 'some-agree'],
    [['agrees', 'unsettled'], 'some-agree'],
    [['differs', 'unsettled'], 'none-agrees'],
    [['unsettled', 'not-computable'], 'unsettled'],
    [[], 'unsettled'],
  ])('%j: %s', (claims, word) => {
    expect(submissionVerdict(claims)).toBe(word);
  });
});
