import { describe, expect, it } from 'vitest';
import type { Quantity } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import { peakLuminosity } from '@/lib/engine/quantities/peak-luminosity';
import { radiatedAngularMomentum } from '@/lib/engine/quantities/radiated-angular-momentum';
import { recoil } from '@/lib/engine/quantities/recoil';
import { measureOf } from './energy-signals';
import { expectedClaim, isThere, title, toleranceOf, waveformOf } from './sheet-waveforms';

type Case = readonly [sheet: string, claim: string, quantity: Quantity, settings: DeclaredSettings];
const floor = { integrationFloor: 0.05 };
const cases: readonly Case[] = [
  ['run3-strain', 'angular-momentum', radiatedAngularMomentum, {}],
  ['run3-strain', 'recoil', recoil, { normaliseBy: 'M' }],
  ['run3-strain', 'peak-luminosity', peakLuminosity, {}],
  ['run3-news', 'angular-momentum', radiatedAngularMomentum, floor],
  ['run3-news', 'recoil', recoil, { ...floor, normaliseBy: 'M' }],
  ['run3-news', 'peak-luminosity', peakLuminosity, floor],
  ['run3-psi4', 'angular-momentum', radiatedAngularMomentum, floor],
  ['run3-psi4', 'recoil', recoil, { ...floor, normaliseBy: 'M' }],
  ['run3-psi4', 'peak-luminosity', peakLuminosity, floor],
  ['simulation', 'angular-momentum', radiatedAngularMomentum, {}],
  ['simulation', 'recoil', recoil, {}],
  ['simulation', 'peak-luminosity', peakLuminosity, {}],
];

describe.runIf(isThere)(title('the open simulation (required: published; arXiv:1904.04831)'), () => {
  it('G5: peaks at 0.001021, N₀ of Healy & Lousto 2017, arXiv:1610.09713; G7: stays at rest by symmetry, to 0.2 km/s; G9: radiates an angular momentum of 0.348351', () => {
    const wave = waveformOf('simulation');
    for (const [quantity, value, tolerance] of [[peakLuminosity, 0.001021, { relative: 5e-3 }], [recoil, 0, { absolute: 0.2 }], [radiatedAngularMomentum, 0.34835112420019887, { relative: 1e-3 }]] as const)
      for (const route of ['A', 'B'] as const) expect(measureOf(quantity, wave).points[0]!.routes[route]).toAgreeWith(value, tolerance);
  });
});

describe.runIf(isThere)(title('angular momentum, recoil and peak luminosity of the reference sheets (required: published for run 3, closed forms and symmetry; independent derivation for the data of arXiv:1904.04831, cubic splines through the samples on quarters of the least step, news and ψ₄ by a transform of twice the length with the floor, sums over neighbouring modes, trapezoids, in numpy and scipy)'), () => {
  it.each(cases)('%s, %s, by both routes', (sheet, claim, quantity, settings) => {
    const expected = expectedClaim(sheet, claim);
    const [figure] = expected.points;
    const { points, findings } = measureOf(quantity, waveformOf(sheet), settings);
    const [point] = points;
    for (const route of ['A', 'B'] as const) expect(point!.routes[route]).toAgreeWith(figure.value, toleranceOf(figure));
    expect(Math.abs(point!.routes.A! - point!.routes.B!)).toBeLessThanOrEqual(quantity.naturalTolerance(point!.value!) / 1000);
    for (const [name, part] of Object.entries(expected.components ?? {})) expect(point!.components![name]).toAgreeWith(part.value, toleranceOf(part));
    expect(findings.filter(({ level }) => level === 'stops-lodging')).toEqual([]);
  });
});
