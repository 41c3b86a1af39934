import { describe, expect, it } from 'vitest';
import { builtInCurve, builtInCurves } from '@/lib/engine/noise/built-in-curves';
import { tabulatedCurve, type NoiseTable } from '@/lib/engine/noise/tabulated-curve';

const table = (changes: Partial<NoiseTable> = {}): NoiseTable => ({
  name: 'S',
  f: [10, 11, 12, 13],
  values: [4e-23, 3e-23, 2e-23, 1e-23],
  meaning: 'asd',
  sided: 'one',
  ...changes,
});
const made = (changes: Partial<NoiseTable> = {}) => {
  const result = tabulatedCurve(table(changes));
  if (!result.ok) throw new Error(JSON.stringify(result.error));
  return result.value;
};
const refused = (changes: Partial<NoiseTable>) => {
  const result = tabulatedCurve(table(changes));
  if (result.ok) throw new Error('was accepted');
  return result.error;
};

describe('a built-in curve', () => {
  it('is positive and finite at every point of the range it declares', () => {
    for (const { id, fLowHz, fHighHz } of builtInCurves)
      for (let k = 0; k <= 4000; k++) {
        const s = builtInCurve(id)!.psd(fLowHz * (fHighHz / fLowHz) ** (k / 4000));
        expect(s > 0 && Number.isFinite(s), `${id} at step ${k}`).toBe(true);
      }
  });
  it('is not known outside that range, apart from a rounding error at its ends', () => {
    const g2 = builtInCurve('G2')!;
    expect(g2.psd(9.9)).toBeNaN();
    expect(g2.psd(8193)).toBeNaN();
    expect(g2.psd(10 * (1 - 1e-10))).toBeGreaterThan(0);
  });
  it('says when it already contains the sky average', () => {
    expect(
      builtInCurves
        .filter((c) => c.alreadyAveraged)
        .map((c) => c.id)
        .sort(),
    ).toEqual(['A5', 'SB']);
  });
  it('is undefined under a name that nobody published', () => expect(builtInCurve('Z9')).toBeUndefined());
  it('has an id of its own, a source and a statement of how it was obtained', () => {
    expect(new Set(builtInCurves.map((c) => c.id)).size).toBe(9);
    for (const c of builtInCurves) expect(c.source.length * c.obtained.length * c.rangeNote.length).toBeGreaterThan(0);
  });
});

describe('a noise table', () => {
  it('is exact at its points and a power law between them', () => {
    const f = [10, 11, 12.1, 13.31];
    const { curve } = made({ f, values: f.map((x) => 1e-20 * x ** -2.5), meaning: 'psd' });
    for (const x of [10, 10.4, 11, 11.9, 13, 13.31, 10.2]) expect(curve.psd(x) / (1e-20 * x ** -2.5)).toBeCloseTo(1, 13);
  });
  it('gives the same value whatever was asked before', () => {
    const f = Array.from({ length: 300 }, (_, i) => 10 * 1.01 ** i);
    const values = f.map((x) => 1e-23 * (2 + Math.sin(x)));
    const { curve } = made({ f, values });
    for (const [a, b] of [
      [11, 150],
      [150, 11],
      [20, 20.1],
      [20.1, 20],
    ] as const) {
      curve.psd(a);
      expect(curve.psd(b)).toBe(made({ f, values }).curve.psd(b));
    }
  });
  it('squares an amplitude density, takes a power density as it stands, divides a squared characteristic by f', () => {
    expect(made().curve.psd(11)).toBeCloseTo(9e-46, 58);
    expect(made({ meaning: 'psd' }).curve.psd(11) / 3e-23).toBeCloseTo(1, 13);
    expect(made({ meaning: 'characteristic' }).curve.psd(11) / (9e-46 / 11)).toBeCloseTo(1, 13);
  });
  it('doubles a two-sided curve', () => expect(made({ sided: 'two' }).curve.psd(12) / made().curve.psd(12)).toBeCloseTo(2, 13));
  it('stops with row and value where the noise is not positive', () => {
    const [finding, ...more] = refused({ values: [4e-23, 3e-23, -2e-23, 1e-23] });
    expect(more).toEqual([]);
    expect(finding).toMatchObject({ code: 'engine/curve-invalid', level: 'stops-lodging', where: 'S, row 3' });
    expect(finding!.text).toContain('-2e-23');
  });
  it('stops where the frequency repeats, falls or is not a number, naming every such row', () => {
    expect(refused({ f: [10, 11, 11, 10.5] }).map((x) => x.where)).toEqual(['S, row 3', 'S, row 4']);
    expect(refused({ f: [10, Number.NaN, 12, 13] })[0]!.where).toBe('S, row 2');
  });
  it('stops when squaring leaves the range of double precision', () => {
    expect(refused({ values: [4e-23, 1e-180, 2e-23, 1e-23] })[0]!.text).toContain('double precision');
  });
  it('stops on one point, and when columns have different lengths', () => {
    expect(refused({ f: [10], values: [1] })).toHaveLength(1);
    expect(refused({ f: [10, 11] })).toHaveLength(1);
  });
  it('reports at most twenty rows of a file that is wrong everywhere', () => {
    expect(refused({ f: Array.from({ length: 500 }, (_, i) => i + 1), values: new Array<number>(500).fill(-1) })).toHaveLength(20);
  });
  it('is worth a look when a step holds fewer than five points an octave and the noise varies there', () => {
    const [finding] = made({ f: [10, 11, 14, 15] }).findings;
    expect(finding).toMatchObject({ code: 'engine/curve-coarse', level: 'worth-a-look', where: 'S, row 3' });
    expect(finding!.text).toContain('from 11 to 14 Hz');
  });
  it('is not coarse when it is constant, nor with exactly five points an octave', () => {
    expect(made({ f: [10, 1000], values: [1, 1], meaning: 'psd' }).findings).toEqual([]);
    expect(made({ f: [0, 1, 2, 3].map((k) => 10 * 2 ** (k / 5)) }).findings).toEqual([]);
  });
  it('names the place that its reader names', () => {
    expect(refused({ values: [1, 0, 1, 1], whereRow: (i) => `noise.txt:${i + 3}` })[0]!.where).toBe('noise.txt:4');
  });
});
