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

describe.runIf(isThere)(title('angular momentum, recoil and peak luminosity of the reference sheets (required: published for run 3, closed forms and symmetry; independent derivation for the data of arXiv:1904.04831, integrated by a separate numpy script)'), () => {
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
