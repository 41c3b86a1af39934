import type { BinaryFacts } from '@/lib/engine/contract/waveform';
import { binaryOf, findingsOf, inM, type FindingSpecimen } from './finding-specimen';

const clean = binaryOf();
const energy = (facts: BinaryFacts, includeEnergyBeforeStart: boolean) =>
  findingsOf('radiated-energy', { of: { a: inM(clean, { binary: { massRatio: 1, chi1z: 0, chi2z: 0, ...facts } }) }, settings: { includeEnergyBeforeStart } });

export const remnantSpecimens: readonly FindingSpecimen[] = [
  {
    number: 'V24', code: 'engine/energy-balance', level: 'worth-a-look', when: 'a stated remnant leaves energy unaccounted for',
    raises: () => energy({ admEnergy: 0.9895, remnantMass: 0.9595 }, false), says: [/leaves -?0\.0\d+ M/, '0.9895', '0.9595'], silent: () => energy({ admEnergy: 0.9895, remnantMass: 0.9516 }, false),
  },
  {
    number: 'V25', code: 'engine/energy-against-fits', level: 'note', when: 'what was radiated before the record is left out',
    raises: () => energy({}, false), says: ['Published fits give 0.0484 M', /A gives 0\.0\d+/, 'before the start'], silent: () => energy({}, true),
  },
];
