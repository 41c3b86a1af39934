import { beforeAll, describe, expect, it } from 'vitest';
import type { Candidate } from '@/lib/explain/candidate';
import { decoyMisfits, decoysOf } from '@/lib/explain/search/chance';
import { judge } from '@/lib/explain/search/judge';
import { scaledClaim } from '@/lib/explain/search/scaled-claim';
import { plantedClaim, unexplainedClaim, unexplainedPair, type MadeSheet } from '@/tests/support/explain-claims';
import { claimOf } from '@/tests/support/explain-flips';
import { predictionTables } from '@/tests/support/explain-tables';
import { seededRandom } from '@/tests/support/seeded-random';

/** Rates in per cent as the methods page shows them; `npx vitest run -u tests/properties/explain-calibration.test.ts` writes them anew. */
const page = '../../content/explain-calibration.json';
const perCent = (part: number, of: number): number => Number(((100 * part) / of).toFixed(1));

/** Single factors of a loudness that people meet: sidedness, prefactor, angular factor, averages, detectors, thresholds, distance, mass, band, curve. */
const factors = [
  Math.SQRT2, Math.SQRT2, Math.SQRT1_2, 0.5, 2, Math.sqrt(2 * Math.PI), 1.585, 1 / 1.585, 0.4, Math.sqrt(0.4), 1 / Math.sqrt(5), 1 / 2.265, 2.265, 8 / 3, 8 / 5, 8 / 7, 0.8, 2 / 3,
  1 / 1.1972 ** 2, 1.138, 0.993, 0.98, 1.05, 1.025, 0.891, 0.852, 0.81,
];
const products = factors.flatMap((a, i) => factors.slice(i + 1).map((b) => a * b));
/** Published: domain reference 3.2, chance of at least one false explanation of a value drawn log-uniform within a factor 3. */
const published = [
  { agreement: 0.001, singles: 2.3, withPairs: 23 },
  { agreement: 0.005, singles: 11, withPairs: 71 },
  { agreement: 0.01, singles: 20, withPairs: 90 },
  { agreement: 0.02, singles: 36, withPairs: 99 },
];

function lattice(agreement: number): { readonly singles: number; readonly withPairs: number } {
  const scaled = scaledClaim(claimOf('C1', [{ claimed: 36.3, value: 36.3, tolerance: Math.log1p(agreement), expandedUncertainty: 0 }]));
  const decoys = decoysOf(scaled, 11, 20_000);
  const rate = (of: readonly number[]): number => perCent(decoyMisfits(decoys, of.map((factor) => Float64Array.of(Math.log(36.3 * factor))), 1, 0).best.filter((misfit) => misfit <= 1).length, decoys.count);
  return { singles: rate(factors), withPairs: rate([...factors, ...products]) };
}

const random = seededRandom(7);
const candidatesOf = ({ claims, tried }: MadeSheet, seed: string): Candidate[][] => [...judge(claims, tried, { seed }).values()].map(({ candidates }) => [...candidates]);
const stands = (changes: 1 | 2) => (candidates: readonly Candidate[]): boolean => candidates.some((one) => one.standing === 'candidate' && one.changes === changes);

interface Falsely {
  readonly claims: number;
  readonly singles: number;
  readonly pairs: number;
  /** Pairs that chance does as well as at most once in a hundred, whether anything else supports them or not. */
  readonly rarePairs: number;
}

const hasRarePair = (candidates: readonly Candidate[]): boolean => candidates.some(({ changes, chance }) => changes === 2 && chance <= 0.01);

function falseRates(sheets: readonly MadeSheet[], name: string): Falsely {
  const all = sheets.flatMap((sheet, n) => candidatesOf(sheet, `${name} ${n}`));
  return { claims: all.length, singles: perCent(all.filter(stands(1)).length, all.length), pairs: perCent(all.filter(stands(2)).length, all.length), rarePairs: perCent(all.filter(hasRarePair).length, all.length) };
}

interface Found {
  readonly claims: number;
  readonly first: number;
  readonly shown: number;
  readonly stands: number;
}

function foundRates(sheets: readonly MadeSheet[], name: string): Found {
  const places = sheets.map((sheet, n) => {
    const [candidates] = candidatesOf(sheet, `${name} ${n}`);
    const place = candidates!.findIndex(({ readings }) => readings.some(({ clause }) => clause === `${sheet.planted} holds`));
    return { place: place < 0 ? Number.POSITIVE_INFINITY : place, stands: candidates![place]?.standing === 'candidate' };
  });
  const rate = (holds: (one: (typeof places)[number]) => boolean): number => perCent(places.filter(holds).length, places.length);
  return { claims: places.length, first: rate(({ place }) => place === 0), shown: rate(({ place }) => place < 3), stands: rate((one) => one.stands) };
}

const made = (count: number, make: (n: number) => MadeSheet): MadeSheet[] => Array.from({ length: count }, (_, n) => make(n));
const several = (): number => 2 + Math.floor(random() * 5);

function calibrate() {
  const tables = predictionTables();
  return {
    decoys: 2000,
    readings: Object.fromEntries(tables.map(({ quantity, flips }) => [quantity, flips.length])),
    lattice: published.map((row) => ({ agreement: row.agreement, published: { singles: row.singles, withPairs: row.withPairs }, ...lattice(row.agreement) })),
    unexplained: {
      onePoint: falseRates(made(500, () => unexplainedClaim(tables, 1, random)), 'one'),
      severalPoints: falseRates(made(300, () => unexplainedClaim(tables, several(), random)), 'several'),
      twoClaims: falseRates(made(100, () => unexplainedPair(tables, random)), 'two'),
    },
    planted: {
      onePoint: foundRates(made(300, () => plantedClaim(tables, 1, random)), 'planted one'),
      severalPoints: foundRates(made(700, () => plantedClaim(tables, several(), random)), 'planted several'),
    },
  };
}

let calibration: ReturnType<typeof calibrate>;
beforeAll(() => void (calibration = calibrate()), 120_000);

describe('how often chance would explain a number', () => {
  it.each(published)('reproduces the published table at an agreement of $agreement', (expected) => {
    const { singles, withPairs } = calibration.lattice.find(({ agreement }) => agreement === expected.agreement)!;
    // The published factors are not listed; ours give the same look-elsewhere within one point, and two where pairs are few.
    expect(Math.abs(singles - expected.singles)).toBeLessThanOrEqual(1);
    expect(Math.abs(withPairs - expected.withPairs)).toBeLessThanOrEqual(2);
  });
});

describe('over 1,000 claims whose gap nothing explains', () => {
  it('a single flip stands falsely in at most 5 %, two at once in at most 1 %', () => {
    console.log(JSON.stringify(calibration, null, 1));
    const groups = Object.values(calibration.unexplained);
    expect(groups.reduce((sum, { claims }) => sum + claims, 0)).toBe(1000);
    for (const { singles, pairs, rarePairs } of groups) {
      expect(rarePairs).toBeLessThanOrEqual(1);
      expect(singles).toBeLessThanOrEqual(5);
      expect(pairs).toBeLessThanOrEqual(1);
    }
  });

  it('and the rule is not so strict that it never speaks: single numbers are explained falsely at times', () => {
    expect(calibration.unexplained.onePoint.singles).toBeGreaterThan(0);
  });
});

describe('over 1,000 claims with one planted error whose effect exceeds T + U', () => {
  it('the planted class comes first in at least 95 % of those with two or more points, and is among the three shown in at least 99 %', () => {
    expect(calibration.planted.severalPoints.claims + calibration.planted.onePoint.claims).toBe(1000);
    expect(calibration.planted.severalPoints.first).toBeGreaterThanOrEqual(95);
    expect(calibration.planted.severalPoints.shown).toBeGreaterThanOrEqual(99);
  });

  it('one number alone often cannot stand: chance does as well', () => {
    expect(calibration.planted.onePoint.stands).toBeLessThan(calibration.planted.severalPoints.stands);
  });
});

describe('what the methods page shows', () => {
  it('is what was computed here', async () => {
    await expect(`${JSON.stringify(calibration, null, 2)}\n`).toMatchFileSnapshot(page);
  });
});
