import { conditionWaveform } from '@/lib/engine/conditioning/condition-waveform';
import type { BestTemplate, DetectorRoute, Side } from '@/lib/engine/contract/route';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { synthesise } from '@/lib/engine/synthesis/synthesise';
import { MSUN_PER_MPC, MSUN_S } from '@/lib/engine/units/constants';
import { band } from './sweep';

/** A signal of 100 M☉ against templates at 50 masses each: ratios 1 to 4, spins −0.8 to 0.8, ten spins a ratio. */
export const signalMassMsun = 100;
const spins = Array.from({ length: 10 }, (_, i) => -0.8 + (1.6 * i) / 9);
/** Fifty factors in steps of 2 %. */
export const massRange: readonly [number, number] = [1 / 1.02 ** 24.5, 1.02 ** 24.5];
export const massFactors: readonly number[] = Array.from({ length: 50 }, (_, i) => massRange[0] * 1.02 ** i);

function waveformOf(name: string, massRatio: number, spin: number): Waveform {
  const { t, modes } = synthesise({ massRatio, chi1z: spin, chi2z: spin, mOmega0: 0.0225, stepM: 1, modes: ['22'] });
  return {
    name,
    domain: 'time',
    unit: 'M',
    amplitudeUnit: 'rh/M',
    variable: 'strain',
    axis: t,
    uniformStep: 1,
    content: { kind: 'modes', modes },
    negativeM: 'given',
    ownTotalMassMsun: null,
    ownDistanceMpc: null,
    junkEndM: null,
    binary: {},
    significantDigits: null,
  };
}

export interface Bank {
  readonly signal: Waveform;
  readonly templates: readonly Waveform[];
}

const ratiosOf = (n: number): number[] => Array.from({ length: n }, (_, i) => 1 + (3 * i) / Math.max(1, n - 1));

export const makeBank = (templates = 200): Bank => ({
  signal: waveformOf('signal', 1.6, 0.37),
  templates: ratiosOf(templates / spins.length).flatMap((q) => spins.map((spin) => waveformOf(`q ${q}, spin ${spin}`, q, spin))),
});

/** Tapered as the house tapers; the script is given the same samples, tapered already. */
export const bankSide = (waveform: Waveform): Side => {
  const conditioned = conditionWaveform(waveform, 'all');
  return {
    waveform: conditioned.used(null),
    taper: conditioned.taper('auto', null).window,
    secondsPerUnit: signalMassMsun * MSUN_S,
    strainPerUnit: (signalMassMsun * MSUN_PER_MPC) / 1000,
    inclinationRad: 0,
    azimuthRad: 0,
  };
};

/** One fitting factor, from samples in memory, nothing prepared beforehand. */
export function fittingFactor(route: DetectorRoute, { signal, templates }: Bank): BestTemplate {
  const [best] = route.bestTemplates([bankSide(signal)], {
    templates: templates.map(bankSide),
    band: band(),
    response: 'plus',
    maximise: ['time', 'phase', 'templateMass'],
    templateMassRange: massRange,
    rescale: (side, factor) => ({ ...side, secondsPerUnit: side.secondsPerUnit * factor, strainPerUnit: side.strainPerUnit * factor }),
  });
  if (!best) throw new Error('no template');
  return best;
}
