import { describe, expect, it } from 'vitest';
import type { Flip } from '@/lib/explain/flip';
import { judge, type Judged } from '@/lib/explain/search/judge';
import type { JudgedClaim, TriedNode } from '@/lib/explain/search/node';
import { claimOf, factorFlip, flipOf, triedNode, triedOf } from '@/tests/support/explain-flips';

const sided = factorFlip('C02:louder', Math.SQRT1_2);
const prefactor = factorFlip('C03:2', Math.SQRT1_2);
const low = flipOf('C04:fLowHz=30');
const taper = flipOf('C37:taper=none');
const frame = flipOf('C11:source');

const judged = (claims: readonly JudgedClaim[], tried: readonly TriedNode[], id = 'C1'): Judged => judge(claims, tried, { seed: 'sheet' }).get(id)!;

const loud = claimOf('C1', [{ claimed: 25.67, value: 36.297, halfDigit: 0.005 }, { claimed: 37.25, value: 52.673, halfDigit: 0.005 }]);
const halved = [36.297 * Math.SQRT1_2, 52.673 * Math.SQRT1_2];

describe('readings with the same numbers', () => {
  const { candidates, search } = judged([loud], [triedOf(prefactor, { C1: halved }), triedOf(sided, { C1: halved }), triedOf(low, { C1: [34.4, 49.6] })]);

  it('are one class, and the words say that the number cannot tell which', () => {
    expect(candidates).toHaveLength(1);
    expect(candidates[0]).toMatchObject({ standing: 'candidate', changes: 1, tried: 3, id: 'C02:louder' });
    expect(candidates[0]!.readings.map(({ conventions }) => conventions)).toEqual([['C02'], ['C03']]);
    expect(candidates[0]!.sentence).toContain('The number alone cannot tell which.');
  });

  it('all readings are counted, those without a number too', () => {
    expect(search).toMatchObject({ tried: 3, failed: 0, decoys: 2000 });
    expect(judged([loud], [triedOf(low, { C1: 'the band holds nothing' })]).search).toMatchObject({ tried: 1, failed: 1, decoys: 0 });
  });

  it('are two classes where another claim of the sheet can tell them apart', () => {
    const second = claimOf('C2', [{ claimed: 4, value: 3 }]);
    expect(judged([loud, second], [triedOf(prefactor, { C1: halved, C2: [5] }), triedOf(sided, { C1: halved })]).candidates).toHaveLength(2);
  });

  it('the one that words speak for comes first, and ten times as far ahead', () => {
    const supported: Flip = { ...prefactor, evidence: 'supports', evidenceFrom: 'statement: “prefactor 2”' };
    const [one] = judged([loud], [triedOf(sided, { C1: halved }), triedOf(supported, { C1: halved })]).candidates;
    expect(one!.readings[0]!.conventions).toEqual(['C03']);
    expect(one!.sentence).toContain('For it speaks statement: “prefactor 2”.');
    const [plain] = judged([loud], [triedOf(sided, { C1: halved })]).candidates;
    expect(one!.odds / plain!.odds).toBeCloseTo(10, 5);
  });
});

describe('what fits', () => {
  it('fits at every point or not at all', () => {
    expect(judged([loud], [triedOf(low, { C1: [25.67, 37.6] })]).candidates).toEqual([]);
    expect(judged([loud], [triedOf(low, { C1: [25.67, null] })]).candidates).toEqual([]);
    expect(judged([loud], [triedOf(low, { C1: [25.67, Number.NaN] })]).candidates).toEqual([]);
  });

  it('a single number that many readings crowd around may be a coincidence', () => {
    const one = claimOf('C1', [{ claimed: 30, value: 36.3, tolerance: 0.01 }]);
    const crowd = Array.from({ length: 40 }, (_, i) => triedOf(flipOf(`C04:fLowHz=${i}`), { C1: [36.3 * 3 ** (i / 20 - 1)] }));
    const { candidates } = judged([one], [...crowd, triedOf(frame, { C1: [30.2] })]);
    const own = candidates.find(({ id }) => id === 'C11:source')!;
    expect(own.standing).toBe('coincidence');
    expect(own.chance).toBeGreaterThan(0.05);
    expect(own.sentence).toContain('may be a coincidence');
  });

  it('and no chance is ever zero', () => {
    expect(judged([loud], [triedOf(sided, { C1: halved })]).candidates[0]!.chance).toBe(1 / 2001);
  });
});

describe('two changes', () => {
  const both = { id: 'C02:louder + C37:taper=none', flips: [sided, taper] as const };

  it('are no reading of their own where one of them gives the number', () => {
    const { candidates, search } = judged([loud], [triedOf(sided, { C1: halved }), triedNode(both, { C1: halved.map((x) => x * (1 + 1e-9)) })]);
    expect(candidates.flatMap(({ readings }) => readings)).toHaveLength(1);
    expect(search.tried).toBe(2);
  });

  it('on two points without support may be coincidence, on three they stand', () => {
    const pairOn = (claim: JudgedClaim, values: number[]): Judged => judged([claim], [triedNode(both, { C1: values }), triedOf(low, { C1: values.map((x) => 1.2 * x) })]);
    expect(pairOn(loud, halved).candidates[0]).toMatchObject({ standing: 'coincidence', changes: 2 });
    const three = { ...loud, points: [...loud.points, { ...loud.points[0]!, value: 60, claimed: 42.43 }] };
    const [found] = pairOn(three, [...halved, 60 * Math.SQRT1_2]).candidates;
    expect(found).toMatchObject({ standing: 'candidate', changes: 2, tried: 2 });
    expect(found!.readings[0]!.clause).toBe('C02:louder holds and, at once, C37:taper=none holds');
  });
});

describe('the claims of a sheet are judged together', () => {
  const agreeing = claimOf('C3', [{ claimed: 12, value: 12 }], { wanting: false });

  it('a reading that breaks a claim which agrees goes to the list, with the claim named', () => {
    const [broken] = judged([loud, agreeing], [triedOf(sided, { C1: halved, C3: [8.5] })]).candidates;
    expect(broken).toMatchObject({ standing: 'coincidence', breaks: ['C3'] });
    expect(broken!.sentence).toContain('C3, which agrees as declared, would not agree under it.');
  });

  it('one that leaves it without a number breaks it too, one that does not touch it does not', () => {
    expect(judged([loud, agreeing], [triedOf(sided, { C1: halved, C3: 'no band' })]).candidates[0]!.breaks).toEqual(['C3']);
    expect(judged([loud, agreeing], [triedOf(sided, { C1: halved })]).candidates[0]!.breaks).toEqual([]);
  });

  it('a claim that did not agree before cannot be broken', () => {
    const wrong = claimOf('C3', [{ claimed: 12, value: 15 }], { wanting: false });
    expect(judged([loud, wrong], [triedOf(sided, { C1: halved, C3: [8.5] })]).candidates[0]!.breaks).toEqual([]);
  });

  it('one that explains a second claim names it and weighs more than one that does not', () => {
    const second = claimOf('C2', [{ claimed: 7.07, value: 10, halfDigit: 0.005 }]);
    const [first, other] = judged([loud, second], [triedOf(taper, { C1: halved, C2: [10.4] }), triedOf(sided, { C1: halved, C2: [7.071] })]).candidates;
    expect(first).toMatchObject({ id: 'C02:louder', explains: ['C2'] });
    expect(other!.explains).toEqual([]);
    expect(first!.odds).toBeGreaterThan(other!.odds);
  });

  it('only claims that want an explanation get one', () => {
    expect([...judge([loud, agreeing], [], { seed: 's' }).keys()]).toEqual(['C1']);
  });
});

describe('an unsettled claim', () => {
  const unsettled = claimOf('C1', [{ claimed: 10.02, value: 10, tolerance: 0.0015, expandedUncertainty: 0.02 }]);

  it('is not explained by what hardly moves the number', () => {
    expect(judged([unsettled], [triedOf(taper, { C1: [10.0005] })]).candidates).toEqual([]);
    expect(judged([unsettled], [triedOf(taper, { C1: [10.02] })]).candidates[0]!.standing).toBe('coincidence');
  });
});

describe('the list', () => {
  const claim = claimOf('C1', [{ claimed: 30, value: 20, tolerance: 0.1 }]);
  const many = Array.from({ length: 30 }, (_, i) => triedOf(flipOf(`C04:fLowHz=${i}`, { assumed: i === 29, evidence: 'supports', evidenceFrom: 'statement: “so”' }), { C1: [30 * (1 + (i - 15) * 0.002)] }));
  const { candidates, fitting } = judged([claim], many);

  it('shows three at most as candidates and closes after twelve more', () => {
    expect(fitting).toBe(30);
    expect(candidates.filter(({ standing }) => standing === 'candidate')).toHaveLength(3);
    expect(candidates.slice(0, 3).every(({ standing }) => standing === 'candidate')).toBe(true);
    expect(candidates).toHaveLength(15);
  });

  it('among readings with like odds the one that contradicts nobody comes first', () => {
    const two = [triedOf(flipOf('C04:fLowHz=10'), { C1: [29.9] }), triedOf(flipOf('C04:fLowHz=40', { assumed: true }), { C1: [30.11] })];
    const [first, second] = judged([claim], two).candidates;
    expect(first!.odds).toBe(second!.odds);
    expect(first!.id).toBe('C04:fLowHz=40');
  });
});

describe('the same input gives the same bytes', () => {
  const second = claimOf('C2', [{ claimed: 7.07, value: 10, halfDigit: 0.005 }]);
  const tried = [triedOf(sided, { C1: halved, C2: [7.071] }), triedOf(prefactor, { C1: halved, C2: [7.071] }), triedOf(low, { C1: [25.6, 37.2] }), triedOf(frame, { C1: [25.7, 37.3], C2: [7.06] })];
  const bytes = (claims: readonly JudgedClaim[], nodes: readonly TriedNode[], seed = 's'): string => JSON.stringify([...judge(claims, nodes, { seed })].sort(([p], [q]) => (p < q ? -1 : 1)));

  it('in whatever order readings come', () => {
    expect(bytes([loud, second], tried)).toBe(bytes([loud, second], [...tried].reverse()));
    expect(bytes([loud, second], tried)).toBe(bytes([loud, second], tried));
  });

  it('and another seed draws other decoys', () => {
    const crowd = Array.from({ length: 40 }, (_, i) => triedOf(flipOf(`C04:fLowHz=${i}`), { C2: [3.4 + 0.7 * i] }));
    const chances = (seed: string): number[] => judge([second], [...crowd, triedOf(sided, { C2: [7.071] })], { seed }).get('C2')!.candidates.map(({ chance }) => chance);
    expect(chances('s')).not.toEqual(chances('t'));
    expect(Math.abs(chances('s')[0]! - chances('t')[0]!)).toBeLessThan(0.05);
  });
});

describe('a hostile submission', () => {
  it('of 50 claims and 10⁴ points is judged within a bounded count of comparisons', () => {
    const points = 200;
    const claims = Array.from({ length: 50 }, (_, c) => claimOf(`C${c}`, Array.from({ length: points }, (_, i) => ({ claimed: 12 + i, value: 10 + i, tolerance: 2, expandedUncertainty: 5 }))));
    const tried = Array.from({ length: 250 }, (_, n) => triedOf(flipOf(`C04:fLowHz=${n}`), Object.fromEntries(claims.map(({ id, points: own }) => [id, own.map(({ value }) => value * (1 + n / 200))]))));
    const all = [...judge(claims, tried, { seed: 'hostile' }).values()];
    // Sixteen points of each decoy at most, and each reading once at each point.
    for (const { comparisons } of all) expect(comparisons).toBeLessThanOrEqual(250 * (2000 * 16 + points));
    const total = all.reduce((sum, { comparisons }) => sum + comparisons, 0);
    console.log(`${total} comparisons`);
    expect(total).toBeLessThanOrEqual(1e8);
  }, 60_000);
});
