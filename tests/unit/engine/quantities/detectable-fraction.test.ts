import { describe, expect, it } from 'vitest';
import type { Measurement } from '@/lib/engine/contract/measurement';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { detectableFraction } from '@/lib/engine/quantities/detectable-fraction';
import { binary, curve } from '../../../support/detector-claims';

const spins = [-0.8, -0.4, 0, 0.4, 0.8];
const signal = (chi: number, facts: Waveform['binary'] = { massRatio: 1, chi1z: chi, chi2z: chi }): Waveform => ({
  ...binary(`spin ${chi}`, { chi1z: chi, chi2z: chi, mOmega0: 0.03, stepM: 1, modes: ['22'] }),
  binary: facts,
});
const family = spins.map((chi) => signal(chi));
const settings: DeclaredSettings = { totalMassMsun: 130, fLowHz: 25 };

const measure = (signals: readonly Waveform[], more: DeclaredSettings = {}, thresholds: readonly number[] | null = null): Measurement =>
  detectableFraction.measure(
    {
      claimId: 'C1',
      inputs: { of: { signals, templates: [family[2]!] }, noise: curve('G2') },
      settings: { ...settings, ...more },
      over: thresholds === null ? null : { setting: 'threshold', values: thresholds },
      claimed: (thresholds ?? [0]).map(() => null),
      withFigures: thresholds === null,
    },
    { onProgress: () => undefined, cancelled: () => false },
  );
const stopsIn = ({ findings }: Measurement): string[] => findings.filter(({ level }) => level === 'stops-lodging').map(({ code }) => code);

describe('a detectable fraction', () => {
  it('grows as the threshold falls, with both routes at every threshold', () => {
    const { points } = measure(family, {}, [0.99, 0.97, 0.9]);
    const values = points.map(({ value }) => value ?? Number.NaN);
    expect([...values].sort((p, q) => p - q)).toEqual(values);
    for (const { value, routes, expandedUncertainty } of points) expect(routes.B).toAgreeWith(value ?? Number.NaN, expandedUncertainty! + 1e-7);
    expect(points[0]!.components).toMatchObject({ points: 5 });
  });

  it('takes the signals in any order, and draws the curve and the plane', () => {
    const [there, back] = [measure(family), measure([...family].reverse())];
    expect(back.points[0]!.value).toAgreeWith(there.points[0]!.value!, 1e-12);
    const curve = there.figures.find(({ kind }) => kind === 'curve');
    expect(curve?.series.filter(({ points }) => points).map(({ label, axis }) => [label, axis])).toEqual([['best match of each signal', 'left'], ['edges', 'left']]);
    const map = there.figures.find(({ kind }) => kind === 'plane');
    const grid = map?.x.values ?? [];
    const levelAt = (chi1: number, chi2: number): number => map?.plane?.level.values[grid.indexOf(chi2) * grid.length + grid.indexOf(chi1)] ?? Number.NaN;
    expect([map?.plane?.y.values, map?.plane?.threshold, map?.plane?.level.values.length]).toEqual([grid, 0.965, grid.length ** 2]);
    // Equal masses: only the sum of the two spins counts, and along the diagonal stand the signals themselves.
    expect(levelAt(-0.4, 0.8)).toAgreeWith(levelAt(0.8, -0.4), 1e-12);
    expect(levelAt(0.8, -0.8)).toAgreeWith(levelAt(0, 0), 1e-12);
    expect(map?.series[0]?.values.filter((v) => v !== null)).toEqual(spins);
    expect(there.assumed).toEqual(expect.arrayContaining(['threshold', 'weight', 'maximise']));
    expect(there.budget.map(({ id }) => id)).toEqual(expect.arrayContaining(['E01', 'E07', 'interpolation']));
  });

  it('stops for fewer than five signals, unequal, unstated or repeated spins, and mixed mass ratios in the plane', () => {
    expect(stopsIn(measure(family.slice(1)))).toEqual(['engine/too-few-points']);
    expect(stopsIn(measure([...family, signal(0.2, { chi1z: 0.3, chi2z: 0.1 })]))).toEqual(['engine/unequal-spins']);
    expect(stopsIn(measure([...family, signal(0.2, {})]))).toEqual(['engine/setting-missing']);
    expect(stopsIn(measure([...family, signal(0.4)]))).toEqual(['engine/same-spin-twice']);
    const mixed = [...family.slice(1), signal(-0.8, { massRatio: 2, chi1z: -0.8, chi2z: -0.8 })];
    expect(stopsIn(measure(mixed))).toEqual(['engine/mass-ratios-differ']);
    expect(stopsIn(measure(mixed, { weight: 'diagonal' }))).toEqual([]);
  });
});
