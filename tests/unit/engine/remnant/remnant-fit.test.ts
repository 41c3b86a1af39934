import { describe, expect, it } from 'vitest';
import type { Measurement } from '@/lib/engine/contract/measurement';
import type { MeasureRequest } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { BinaryFacts } from '@/lib/engine/contract/waveform';
import { remnantFit } from '@/lib/engine/quantities/remnant-fit';
import { evenTimes, gaussian, modeFrom, modeSet } from '../../../golden/energy-signals';

const lending = (binary: BinaryFacts) => {
  const axis = evenTimes(-20, 20, 1);
  return { a: modeSet(axis, [modeFrom(axis, 2, 2, gaussian(0.1, 5, 0.4, 0))], 'strain', binary) };
};
const requestOf = (settings: DeclaredSettings, of: MeasureRequest['inputs']['of'] = {}): MeasureRequest => ({ claimId: 'C1', inputs: { of, noise: null }, settings, over: null, claimed: [null], withFigures: true });
const measure = (settings: DeclaredSettings, of: MeasureRequest['inputs']['of'] = {}): Measurement => remnantFit.measure(requestOf(settings, of), { onProgress: () => undefined, cancelled: () => false });
const codes = ({ findings }: Measurement): string[] => findings.map(({ code }) => code);

describe('a published fit', () => {
  it('needs no waveform: the mass ratio is enough, spins that nobody states are none and are listed', () => {
    const { points, assumed, findings } = measure({ massRatio: 2, observable: 'spin', fit: 'husa2016' });
    expect(points[0]!.value).toAgreeWith(0.62354, 1e-5);
    expect(points[0]!.routes.B).toAgreeWith(points[0]!.value!, 1e-13);
    expect(assumed).toEqual(['chi1z', 'chi2z']);
    expect(findings).toEqual([]);
  });
  it('is asked for its mass ratio when neither claim nor waveform states one', () => {
    expect(remnantFit.required({ of: {}, noise: null }, {}, null)).toEqual(['massRatio']);
    expect(remnantFit.required({ of: {}, noise: null }, { massRatio: 3 }, null)).toEqual([]);
    expect(remnantFit.required({ of: lending({ massRatio: 3 }), noise: null }, {}, null)).toEqual([]);
    expect(measure({}).points[0]!.value).toBeNull();
  });
  it('takes mass ratio and spins from a waveform, unless the claim says otherwise', () => {
    const of = lending({ massRatio: 3, chi1z: 0.5, chi2z: 0.2 });
    expect(measure({ observable: 'recoil' }, of).points[0]!.value).toAgreeWith(118.5, 0.06);
    expect(measure({ observable: 'recoil', chi1z: 0.2, chi2z: 0.5 }, of).points[0]!.value).toAgreeWith(169.2, 0.06);
    expect(measure({ observable: 'recoil' }, of).assumed).toEqual(['fit']);
  });
  it('shows every group by name, and what the mean leaves out', () => {
    const plain = measure({ massRatio: 1, chi1z: 0, chi2z: 0 }).points[0]!;
    expect(plain.value).toAgreeWith((0.95176 + 0.95151 + 0.95161 + 0.95158) / 4, 1e-5);
    expect(plain.components).toMatchObject({ pan2011: expect.closeTo(0.95176, 5), jimenez2017: expect.closeTo(0.95158, 5), halfRange: expect.closeTo(1.26e-4, 6) });
    const spinning = measure({ massRatio: 3, chi1z: 0.5, chi2z: 0.2, observable: 'spin' }).points[0]!;
    expect(spinning.value).toAgreeWith((0.76121 + 0.76113 + 0.7607) / 3, 1e-5);
    expect(spinning.components).toMatchObject({ pan2011: null, buonanno2008: expect.closeTo(0.758, 3) });
  });
  it('a recoil that symmetry forbids is nothing, without a rounding of its own', () => {
    const [point] = measure({ massRatio: 1, chi1z: 0.6, chi2z: 0.6, observable: 'recoil' }).points;
    expect(point).toMatchObject({ value: 0, expandedUncertainty: 0 });
  });

  it('does not know its scatter where one group speaks alone', () => {
    const { points, budget } = measure({ massRatio: 2, chi1z: 0, chi2z: 0, observable: 'recoil' });
    expect(points[0]!.components).toEqual({ campanelli2007: expect.closeTo(156.7, 1), halfRange: null });
    expect(budget.find(({ id }) => id === 'E16')?.u).toBeNull();
  });
  it('lists half the range of the groups over √3 as coverage, outside U', () => {
    const { points, budget } = measure({ massRatio: 2, chi1z: 0, chi2z: 0, observable: 'spin' });
    const line = budget.find(({ id }) => id === 'E16')!;
    expect(line.group).toBe('coverage');
    expect(line.u).toAgreeWith((0.62354 - 0.62284) / 2 / Math.sqrt(3), 3e-6);
    expect(points[0]!.expandedUncertainty).toBeLessThan(1e-12);
  });
  it('stops where it does not give the observable, or was made for bodies without spin', () => {
    for (const settings of [{ fit: 'keitel2017' }, { fit: 'husa2016', observable: 'recoil' }, { fit: 'buonanno2008' }, { fit: 'pan2011', chi1z: 0.1 }] as const) {
      const found = measure({ massRatio: 2, chi2z: 0, chi1z: 0, ...settings });
      expect(found.points[0]!.value, settings.fit).toBeNull();
      expect(codes(found)).toEqual(['engine/fit-not-applicable']);
    }
  });
  it('reads a mass ratio below one with the heavier body first', () => {
    const found = measure({ massRatio: 1 / 3, chi1z: 0.2, chi2z: 0.5, observable: 'recoil' });
    expect(found.points[0]!.value).toAgreeWith(118.5, 0.06);
  });
  it('says when it is continued beyond what it was made from', () => {
    const found = measure({ massRatio: 30, chi1z: 0, chi2z: 0 });
    expect(codes(found)).toEqual(['engine/fit-beyond-range', 'engine/fit-beyond-range']);
    expect(found.findings[0]!.text).toContain('30');
    expect(codes(measure({ massRatio: 2, chi1z: 0.99, chi2z: 0, fit: 'husa2016' }))).toEqual([]);
    expect(codes(measure({ massRatio: 2, chi1z: 0.99, chi2z: 0, fit: 'jimenez2017' }))).toEqual(['engine/fit-beyond-range']);
  });
  it('draws each group and the band they span, which closes on the mean', () => {
    const [figure] = measure({ massRatio: 2, chi1z: 0, chi2z: 0 }).figures;
    expect(figure!.series.map(({ label }) => label)).toEqual(['Lowest of the fits', 'Highest of the fits', 'pan2011', 'healy2014', 'husa2016', 'jimenez2017']);
    expect(figure!.x.values).toContain(2);
    const [low, high, ...groups] = figure!.series.map(({ values }) => values as number[]);
    figure!.x.values.forEach((_, i) => {
      expect(Math.min(...groups.map((values) => values[i]!))).toBe(low![i]);
      expect(Math.max(...groups.map((values) => values[i]!))).toBe(high![i]);
      expect(groups.reduce((sum, values) => sum + values[i]!, 0)).toAgreeWith(0, 1e-12);
    });
  });
  it('has tolerances that fit its observables', () => {
    expect(remnantFit.naturalTolerance(0.95, {})).toBe(1e-3);
    expect(remnantFit.naturalTolerance(0.68, { observable: 'spin' })).toBe(1e-3);
    expect(remnantFit.naturalTolerance(200, { observable: 'recoil' })).toBe(10);
    expect(remnantFit.naturalTolerance(1e-3, { observable: 'peak-luminosity' })).toAgreeWith(5e-5, 1e-12);
  });
});
