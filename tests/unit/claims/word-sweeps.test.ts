import { describe, expect, it } from 'vitest';
import { figureCsv } from '@/app/_ui/charts/export/figure-csv';
import { figureSvg } from '@/app/_ui/charts/export/figure-svg';
import { readoutOf } from '@/app/_ui/charts/readout';
import { formatAt } from '@/app/_ui/claim/setting-names';
import { claimSheetJsonSchema, resultJsonSchema } from '@/lib/claims/json-schemas';
import { parseClaimSheet } from '@/lib/claims/parse-sheet';
import { atWords, errorBarIndices, fromNeighbours, routeBIndices } from '@/lib/engine/budget/chosen-points';
import { sensitivitiesOf } from '@/lib/engine/budget/sensitivities';
import type { Figure, Measurement } from '@/lib/engine/contract/measurement';
import { match } from '@/lib/engine/quantities/match';
import { snr } from '@/lib/engine/quantities/snr';
import { sweepFigure } from '@/lib/engine/quantities/sweep-figure';
import { formatProblem } from '@/lib/kernel/problem';
import { samePlace } from '@/lib/kernel/place';
import { catalogue } from '@/lib/pipeline/catalogue';
import { findAnchoredNumber } from '@/lib/reviews/anchors';
import { remarksOf } from '@/lib/verdicts/remarks';
import { binary, measured } from '../../support/detector-claims';

const sheet = (taper: readonly unknown[]) => ({
  format: 'counterfoil-claim/1', title: 'Tapers', noise: { S: { curve: 'G2' } },
  waveforms: { A: { file: 'a.txt', columns: ['t', 're22', 'im22'] }, B: { file: 'b.txt', columns: ['t', 're22', 'im22'] } },
  claims: [{ id: 'C1', quantity: 'match', of: { a: 'A', b: 'B' }, noise: 'S', settings: { totalMassMsun: 60 }, over: { taper }, claimed: taper.map(() => '0.9') }],
});
const over = { setting: 'taper', values: ['auto', 'none', 2] } as const;

describe('a sheet that sweeps over words', () => {
  it('is read with its words and numbers in their order', () => {
    const read = parseClaimSheet(sheet(['none', 0.5, 'auto']), catalogue);
    expect(read.ok && read.value.claims[0]?.over).toEqual({ setting: 'taper', values: ['none', 0.5, 'auto'] });
  });

  it('is refused at the word that the setting does not have', () => {
    const read = parseClaimSheet(sheet(['auto', 'hann', 20]), catalogue);
    const told = read.ok ? [] : read.error.map(formatProblem);
    expect(told).toEqual([
      '/claims/0/over/taper/1: saw "hann"; expected "auto", "none" or a number from 0.1 to 10.',
      '/claims/0/over/taper/2: saw 20; expected "auto", "none" or a number from 0.1 to 10.',
    ]);
  });

  it('stands in both published schemas', () => {
    expect(JSON.stringify(claimSheetJsonSchema(catalogue))).toContain('"none"');
    expect(JSON.stringify(resultJsonSchema())).toContain('"at":{"type":"object","propertyNames":{"type":"string"},"additionalProperties":{"type":["number","string"]}}');
  });
});

describe('points that stand at words', () => {
  it('are each asked by both routes and for their error, however many there are', () => {
    const many = ['none', ...Array.from({ length: 30 }, (_, i) => 0.1 + 0.1 * i), 'auto'];
    expect(atWords(many)).toEqual([0, 31]);
    for (const chosen of [routeBIndices(32, 7, [0, 31]), errorBarIndices(32, 7, [0, 31])]) expect(chosen).toEqual(expect.arrayContaining([0, 1, 7, 30, 31]));
  });

  it('lend no error to a neighbour and borrow none', () => {
    expect(fromNeighbours(4, new Map([[0, 9], [1, 1], [3, 2]]), [0])).toEqual([9, 1, 2, 2]);
  });

  it('are one place with themselves alone', () => {
    expect(samePlace({ taper: 'none' }, { taper: 'none' })).toBe(true);
    expect(samePlace({ taper: 'none' }, { taper: 'auto' })).toBe(false);
    expect(samePlace({ taper: '1' }, { taper: 1 })).toBe(false);
    expect(samePlace({ totalMassMsun: 60 }, { totalMassMsun: 60 * (1 + 1e-12) })).toBe(true);
  });

  it('are found again by the thread that hangs on them', () => {
    const point = (taper: string, value: number) => ({ at: { taper }, printed: '0.9', value });
    const result = { claims: [{ id: 'C1', points: [point('auto', 0.91), point('none', 0.92)] }] } as unknown as Parameters<typeof findAnchoredNumber>[0];
    expect(findAnchoredNumber(result, { claim: 'C1', at: { taper: 'none' } })?.value).toBe(0.92);
  });

  it('are told one by one where only some of them hold', () => {
    const at = (taper: string | number, word: 'agrees' | 'differs') => ({ word, claimed: { kind: 'value', value: 1, uncertainty: null, digits: null, printed: '1' }, measured: { at: { taper }, value: 1, routes: { A: 1, B: 1 }, expandedUncertainty: null } }) as const;
    const points = [at('auto', 'agrees'), at('none', 'agrees'), at(0.5, 'agrees'), at(1, 'agrees'), at(2, 'differs')];
    expect(remarksOf(points, [], { expanded: null } as Parameters<typeof remarksOf>[2])).toEqual(['narrower scope: holds at 4 of 5 points (taper auto, none, 0.5, 1)']);
  });

  it('are said in words', () => {
    expect(formatAt({ taper: 'none' })).toBe('Taper none');
  });
});

describe('a loudness over tapers', () => {
  const a = binary('A', { stepM: 2 });
  const swept = measured({ quantity: 'snr', a, settings: { totalMassMsun: 60, distanceMpc: 1000, fLowHz: 20 }, over, claimed: [30, 30, 30] });
  const alone = (taper: 'auto' | 'none' | number) => measured({ quantity: 'snr', a, settings: { totalMassMsun: 60, distanceMpc: 1000, fLowHz: 20, taper } }).points[0];

  it('gives at each word what a claim with that taper gives', () => {
    for (const [i, taper] of over.values.entries()) {
      expect(swept.points[i]).toMatchObject({ at: { taper }, value: alone(taper)?.value, routes: alone(taper)?.routes });
      expect(swept.points[i]?.expandedUncertainty).toBeGreaterThan(0);
    }
    expect(new Set(swept.points.map(({ value }) => value)).size).toBe(3);
  });

  it('tries the other words of the swept setting as sensitivities', () => {
    const tried: unknown[] = [];
    const request = { claimId: 'C1', inputs: { of: { a }, noise: null }, settings: {}, over, claimed: [], withFigures: true };
    sensitivitiesOf({ request, measurement: swept as Measurement, index: 1, here: swept.points[1]?.value ?? Number.NaN, rerun: (change) => (change.swept === undefined || tried.push(change.swept), 1) });
    expect(tried).toEqual(['auto']);
  });
});

describe('the figure of such a sweep', () => {
  const point = (taper: string | number, value: number) => ({ at: { taper }, value, routes: { A: value, B: value }, expandedUncertainty: 0.01 });
  const [figure] = sweepFigure(match, { claimId: 'C1', inputs: { of: {}, noise: null }, settings: {}, over, claimed: [0.9, null, 0.8], withFigures: true }, [point('auto', 0.91), point('none', 0.95), point(2, 0.83)]) as [Figure];
  const origin = { source: 'a record', stem: 'x', claimId: 'C1', quantity: 'Match of A and B', place: null };

  it('has the words along its axis, in the order of the sheet', () => {
    expect(figure.x).toEqual({ label: 'taper', unit: '', scale: 'linear', values: [0, 1, 2], words: ['auto', 'none', '2'] });
    expect(readoutOf(figure, 1)).toBe('at “none”: recomputed = 0.95000, band 0.94000 to 0.96000');
  });

  it('joins no two of them: points with upright bars, and no line or band', () => {
    const { svg } = figureSvg({ figure, origin, range: null });
    expect(svg).toContain('>none</text>');
    expect(svg.match(/<circle/g)).toHaveLength(5 + 2);
    expect(svg).not.toContain('fill-opacity="0.2"');
    expect([...svg.matchAll(/<path d="M[^"L]*L[^"L]*L/g)]).toEqual([...svg.matchAll(/<path d="(?:M[^"ML]*L[^"ML]*){3}"/g)].map((m) => expect.objectContaining({ index: m.index })));
  });

  it('is saved as a table of words', () => {
    expect(figureCsv(figure, origin)).toContain('\r\nnone,0.95,0.94,0.96,\r\n');
  });

  it('carries the quantity’s unit upwards and the setting’s across, where numbers are swept', () => {
    const at = (mass: number) => ({ at: { totalMassMsun: mass }, value: mass, routes: { A: mass, B: mass }, expandedUncertainty: 1 });
    const [drawn] = sweepFigure({ unit: 'Mpc' }, { claimId: 'C', inputs: { of: {}, noise: null }, settings: {}, over: { setting: 'totalMassMsun', values: [100, 50] }, claimed: [], withFigures: true }, [at(100), at(50)]) as [Figure];
    expect(drawn.x).toEqual({ label: 'totalMassMsun', unit: 'M☉', scale: 'linear', values: [50, 100] });
    expect(drawn.series.map(({ unit, values }) => [unit, values[0]])).toEqual([['Mpc', 50], ['Mpc', 49], ['Mpc', 51], ['Mpc', null]]);
    expect(sweepFigure(snr, { claimId: 'C', inputs: { of: {}, noise: null }, settings: {}, over: null, claimed: [], withFigures: true }, [at(1)])).toEqual([]);
  });
});
