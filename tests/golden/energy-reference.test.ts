import { describe, expect, it } from 'vitest';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import { energyBy, measureEnergyOf } from './energy-signals';
import { expectedClaim, isThere, title, toleranceOf, waveformOf } from './sheet-waveforms';

type Case = readonly [sheet: string, claim: string, settings: DeclaredSettings];
const floor = { integrationFloor: 0.05 };
const cases: readonly Case[] = [
  ['run3-strain', 'energy', {}],
  ['run3-strain', 'energy-22', { modes: [[2, 2]] }],
  ['run3-strain', 'energy-l2', { lMax: 2 }],
  ['run3-news', 'energy', floor],
  ['run3-news', 'energy-22', { ...floor, modes: [[2, 2]] }],
  ['run3-psi4', 'energy', floor],
  ['run3-psi4', 'energy-l2', { ...floor, lMax: 2 }],
  ['simulation', 'energy', {}],
  [
    'simulation',
    'energy-22',
    {
      modes: [
        [2, 2],
        [2, -2],
      ],
    },
  ],
];

describe.runIf(isThere)(
  title(
    'energies of the reference sheets (required: published for run 3, closed forms; independent derivation for the data of arXiv:1904.04831, cubic splines through the samples on quarters of the least step, news and ψ₄ by a transform of twice the length with the floor, trapezoids, in numpy and scipy)',
  ),
  () => {
    it.each(cases)('%s, %s, by both routes', (sheet, claim, settings) => {
      const [figure] = expectedClaim(sheet, claim).points;
      const wave = waveformOf(sheet);
      for (const route of ['A', 'B'] as const) {
        expect(energyBy(route, wave, settings)).toAgreeWith(figure.value, toleranceOf(figure));
      }
    });

    it('G9: find the same energy in the simulation by differences and by splines, within U', () => {
      const [point] = measureEnergyOf(waveformOf('simulation')).points;
      expect(point!.routes.B).toAgreeWith(point!.routes.A!, { absolute: point!.expandedUncertainty! });
      expect(point!.value).toAgreeWith(0.038114, 5e-7);
    });

    it('raise no burst in a record that was cut long after its start', () => {
      expect(measureEnergyOf(waveformOf('simulation')).findings.map(({ code }) => code)).toEqual(['engine/energy-against-fits']);
    });
  },
);
