import type { Finding } from '../contract/finding';
import type { Waveform } from '../contract/waveform';
import type { CompletedModes } from '../conditioning/complete-modes';
import type { ModeEnergy } from './energy-on-samples';
import type { SampledRadiation } from './news-on-samples';
import type { RadiationRecord } from './radiation-record';
import { coarsestSampling } from './sampling';
import { startBurst } from './start-burst';

const figures = (x: number, digits = 3): string => Number(x.toPrecision(digits)).toString();

/**
 * V14: partners with m < 0 were made up; `without` says what the number would be else.
 * Shape:  a list of one finding, or empty.
 * Units:  none.
 * Error:  thresholds only.
 * Fails:  never.
 * Source: domain reference 4.3, V14.
 */
export function negativeModesFinding(completed: CompletedModes, name: string, without = ''): Finding[] {
  if (!completed.mirrorAssumed) return [];
  return [
    {
      code: 'engine/negative-m-assumed',
      level: 'needs-answer',
      where: name,
      text: `Modes with m < 0 are absent from ${name} and the sheet does not say why. We use H(ℓ,−m) = (−1)^ℓ H*(ℓ,m), which holds for a system symmetric about its orbital plane${without}.`,
      fix: 'Declare negativeM: mirror, given or none.',
    },
  ];
}

/**
 * V13 for a sum over modes: the quadrupole incomplete, or nothing above ℓ = 2 in the file. `higher` says what such modes would add.
 * Shape:  a list, empty when there is nothing to say.
 * Units:  none.
 * Error:  thresholds only.
 * Fails:  never.
 * Source: domain reference 4.3, V13.
 */
export function missingModesFindings(completed: CompletedModes, missing: readonly (readonly [number, number])[], modesDeclared: boolean, noun: string, higher: string): Finding[] {
  const { waveform, negativeM } = completed;
  const { content, name } = waveform;
  if (content.kind !== 'modes') return [];
  const base = { code: 'engine/modes-missing', level: 'worth-a-look', where: name } as const;
  const listed = missing.map(([l, m]): Finding => ({ ...base, text: `The claim lists mode (${l},${m}), which ${name} does not hold; it counts as zero.`, fix: 'Supply the mode or leave it out of the list.' }));
  if (modesDeclared) return listed;
  const has = (l: number, m: number): boolean => content.modes.some((mode) => mode.l === l && mode.m === m);
  const quadrupole = [2, -2].filter((m) => !has(2, m) && !(m < 0 && negativeM === 'none'));
  if (quadrupole.length > 0) {
    const names = quadrupole.map((m) => `(2,${m})`).join(' and ');
    return [...listed, { ...base, text: `${names} is not in ${name}. The (2,±2) modes usually carry more than nine tenths of the ${noun}.`, fix: 'Supply the mode, or list the modes that are meant.' }];
  }
  const highest = Math.max(...content.modes.map(({ l }) => l));
  if (highest > 2) return listed;
  return [...listed, { ...base, text: `${name} holds modes of ℓ = 2 alone. ${higher}`, fix: 'Supply higher modes, or declare lMax: 2 to say that ℓ = 2 is meant.' }];
}

/**
 * V09: start-up radiation inside the integral.
 * Shape:  a list of one finding, or empty.
 * Units:  startM in M.
 * Error:  thresholds only.
 * Fails:  never.
 * Source: domain reference 4.3, V09.
 */
export function burstFindings(radiation: SampledRadiation, startM: number, waveform: Waveform, startDeclared: boolean): Finding[] {
  const burst = startBurst(radiation);
  if (burst === null || startM >= burst.arrivalM + 3 * burst.spreadM) return [];
  const asked = !startDeclared && waveform.junkEndM === null;
  return [
    {
      code: 'engine/startup-burst',
      level: asked ? 'needs-answer' : 'worth-a-look',
      where: waveform.name,
      text: `A burst of energy ${figures(burst.energy, 2)} M arrives at t = ${figures(burst.arrivalM)} ± ${figures(Math.max(burst.spreadM, 1), 2)} M in ${waveform.name}. It is ${figures(100 * burst.share, 2)} % of the energy of the record and lies inside the integral.`,
      fix: `Declare where the start-up radiation ends (junkEndM, or startM in the claim); after t = ${figures(burst.endM)} M it is over.`,
    },
  ];
}

const FEW = 12;
const TOO_FEW = 4;

/**
 * V04: samples to a period of the fastest mode that matters.
 * Shape:  a list of one finding, or empty.
 * Units:  M.
 * Error:  thresholds only.
 * Fails:  never.
 * Source: domain reference 4.3, V04.
 */
export function samplingFindings(record: RadiationRecord, energies: readonly ModeEnergy[], name: string): Finding[] {
  const found = coarsestSampling(record, energies);
  if (found === null || found.samplesPerPeriod >= FEW) return [];
  const stops = found.samplesPerPeriod < TOO_FEW;
  const what = `The (${found.l},${found.m}) mode of ${name} has a period of ${figures(found.periodM)} M at t = ${figures(found.atM, 6)} M and steps of ${figures(found.stepM)} M there: ${figures(found.samplesPerPeriod)} samples to a period.`;
  return [
    {
      code: 'engine/sampling',
      level: stops ? 'stops-lodging' : 'worth-a-look',
      where: name,
      text: stops ? `${what} At least ${TOO_FEW} are needed.` : `${what} We use differences of twelfth order; second-order ones would lose about 1 % of an energy.`,
      fix: 'Supply the record with a smaller step.',
    },
  ];
}
