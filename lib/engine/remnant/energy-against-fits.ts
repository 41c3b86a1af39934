import type { Finding } from '../contract/finding';
import type { BinaryParameters } from '../synthesis/binary';
import { heavierFirst } from './fit-point';
import { bandOf, meanOf, readFits } from './published-fits';

/** V25: further than this from the band. */
const BEYOND = 0.1;

const digits = (x: number): string => x.toFixed(4);

/**
 * V25: energy since infinite separation against what published fits give for the same binary.
 * Shape:  a list of one finding, or empty.
 * Units:  fractions of M.
 * Error:  thresholds only.
 * Fails:  never; silent where mass ratio or spins are not known, or spins are beyond 1.
 * Source: domain reference 4.3, V25; settings.md section 8.
 */
export function energyAgainstFits(binary: BinaryParameters | null, energy: number, addsBefore: boolean, where: string): Finding[] {
  if (binary === null || Math.max(Math.abs(binary.chi1z), Math.abs(binary.chi2z)) > 1) return [];
  const readings = readFits('mass', heavierFirst(binary), 'A');
  const [lightest, heaviest] = bandOf(readings);
  const [low, high] = [1 - heaviest, 1 - lightest];
  if (energy >= (1 - BEYOND) * low && energy <= (1 + BEYOND) * high) return [];
  const why = energy > high ? 'More was radiated than any of them allows.' : addsBefore ? 'Less was radiated than any of them allows.' : `With ${digits(energy)} you may not have added the energy radiated before the start.`;
  return [{
    code: 'engine/energy-against-fits', level: 'note', where,
    text: `Published fits give ${digits(1 - meanOf(readings))} M for this mass ratio and these spins (${digits(low)} to ${digits(high)}); ${where} gives ${digits(energy)}. ${why}`,
    fix: energy > high ? 'Check amplitudes, units and modes.' : addsBefore ? 'Check amplitudes, units and modes.' : 'Declare includeEnergyBeforeStart: true if all of it is meant.',
  }];
}
