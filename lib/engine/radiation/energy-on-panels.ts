import { ENERGY_FACTOR, type ModeEnergy } from './energy-on-samples';
import { countedNodes, radiationOnPanels } from './news-on-panels';
import type { RadiationRecord } from './radiation-record';

/**
 * Route B: energy of each mode from startM to the last sample, by splines of degree 7 on the samples
 * and Gauss panels between them.
 * Shape:  one entry a mode.
 * Units:  startM in M, floor in rad/M for |m| = 2; energies as fractions of M.
 * Error:  that of radiationOnPanels; quadrature below rounding.
 * Fails:  never; a start after the record gives zero.
 * Source: Q12; rule 2.9.
 */
export function energyOnPanels(record: RadiationRecord, startM: number, floor: number): ModeEnergy[] {
  const { nodes, modes } = radiationOnPanels(record, startM, floor, false);
  const { t, w } = countedNodes(nodes);
  return modes.map(({ l, m, news }) => {
    const { re, im } = news(t);
    let sum = 0;
    for (let i = 0; i < t.length; i++) sum += w[i]! * (re[i]! * re[i]! + im[i]! * im[i]!);
    return { l, m, energy: ENERGY_FACTOR * sum };
  });
}
