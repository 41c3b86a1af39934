import type { Finding } from '../contract/finding';
import type { RadiationRecord } from '../radiation/radiation-record';
import { coarsestSampling } from '../radiation/sampling';
import { short } from '../findings/spelt';
import { toneName, type Tone } from './tone';


const FEW = 12;
const TOO_FEW = 4;

/**
 * V04 for the one mode in use.
 * Shape:  a list of one finding, or empty.
 * Units:  M.
 * Error:  periods are read between samples.
 * Fails:  never.
 * Source: domain reference 4.3, V04.
 */
export function toneSampling({ axis, re, im, mode }: Tone, name: string): Finding[] {
  const [l, m] = mode ?? [0, 0];
  const record: RadiationRecord = { axis, step: null, variable: 'strain', modes: [{ l, m, re, im }] };
  const found = coarsestSampling(record, [{ l, m, energy: 1 }]);
  if (found === null || found.samplesPerPeriod >= FEW) return [];
  const stops = found.samplesPerPeriod < TOO_FEW;
  const tail = stops ? `At least ${TOO_FEW} are needed to follow its phase.` : 'Between them the phase is followed by polynomials of high order.';
  return [
    {
      code: 'engine/sampling',
      level: stops ? 'stops-lodging' : 'worth-a-look',
      where: name,
      text: `A period of ${toneName({ mode })} of ${name} lasts ${short(found.periodM)} M at t = ${short(found.atM, 6)} M, with steps of ${short(found.stepM)} M there: ${short(found.samplesPerPeriod)} samples to a period. ${tail}`,
      fix: 'Supply the record with a smaller step.',
    },
  ];
}
