import { describe, expect, it } from 'vitest';
import { MSUN_S } from '@/lib/engine/units/constants';
import { binary, measured } from '../../../support/detector-claims';

const STEP_M = 0.5;
/** Half the sampling rate, as a detector sees a record of this mass. */
const nyquistHz = (massMsun: number): number => 1 / (2 * STEP_M * massMsun * MSUN_S);

describe('a sweep of the mass whose upper edge nobody declared', () => {
  const masses = [20, 100, 400];
  const swept = measured({ quantity: 'snr', a: binary('A', { stepM: STEP_M }), settings: { distanceMpc: 400, fLowHz: 20 }, over: { setting: 'totalMassMsun', values: masses }, claimed: masses.map(() => null), withFigures: true });

  it('keeps for each point the edge that was used there: the curve’s end, or the Nyquist frequency of that mass', () => {
    swept.points.forEach((point, i) => {
      const expected = Math.min(8192, nyquistHz(masses[i] ?? Number.NaN));
      expect(point.settings?.['fHighHz']).toAgreeWith(expected, 1e-6 * expected);
    });
  });
  it('keeps nothing beside it: what is swept or alike at all points is told once', () => {
    expect(swept.points.map((point) => Object.keys(point.settings ?? {}))).toEqual(masses.map(() => ['fHighHz']));
  });
  it('says which point its curves are of', () => {
    expect(swept.figures.filter((figure) => figure.kind !== 'sweep').map((figure) => Object.keys(figure.at ?? {}))).toEqual([['totalMassMsun'], ['totalMassMsun']]);
    expect(swept.figures.find((figure) => figure.kind === 'sweep')?.at).toBeUndefined();
  });
});

describe('a claim of one value', () => {
  it('has no settings of its own at its point', () => {
    const single = measured({ quantity: 'snr', a: binary('A', { stepM: STEP_M }), settings: { totalMassMsun: 100, distanceMpc: 400, fLowHz: 20 } });
    expect(single.points[0]?.settings).toBeUndefined();
  });
});
