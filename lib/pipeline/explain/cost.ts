import type { Claim } from '@/lib/claims/claim';
import type { QuantityInputs } from '@/lib/engine/contract/quantity';
import type { Waveform } from '@/lib/engine/contract/waveform';

/**
 * The budget of a search is counted, not timed: a clock would not count the same twice. One unit is
 * about one inner product of two short records.
 */
export const budget = {
  /** Reruns of one claim. */
  reruns: 60,
  /** Units of one rerun, some two seconds; what is dearer is left to a person, as a variation. */
  unitsEach: 25,
  /** Units of a whole sheet, some two minutes. */
  units: 1200,
  /** Points of a claim that are asked: the ends, the one furthest off and others between. */
  points: 12,
} as const;

const SAMPLES_PER_UNIT = 2e5;

/** Searches over angles, masses or banks, in single numbers. */
const dear: Readonly<Record<string, number>> = { 'mode-content': 60, degeneracy: 60, 'fitting-factor': 20, 'detectable-fraction': 60, 'horizon-redshift': 4, 'horizon-distance': 4, 'volume-ratio': 4 };
const dearMaxima: Readonly<Record<string, number>> = { templateMass: 20, inclination: 60, polarisation: 3 };
/** The azimuth of a mode set is searched for, not read off a modulus. */
const ofAzimuth = 120;

const samplesIn = ({ axis, content }: Waveform): number => axis.length * (content.kind === 'modes' ? content.modes.length : 2);

const all = ({ of }: QuantityInputs): Waveform[] => Object.values(of).flat().filter((waveform): waveform is Waveform => waveform !== undefined);

/** Units that one rerun of the claim at so many points takes. */
export function costOf({ quantity }: Claim, inputs: QuantityInputs, points: number, maximise: readonly string[] = [], isComplex = false): number {
  const samples = all(inputs).reduce((sum, waveform) => sum + samplesIn(waveform), 0);
  const turns = isComplex && maximise.includes('phase') && all(inputs).some(({ content }) => content.kind === 'modes');
  const search = maximise.reduce((most, name) => Math.max(most, dearMaxima[name] ?? 1), turns ? ofAzimuth : 1);
  return Math.max(1, samples / SAMPLES_PER_UNIT) + points * (dear[quantity.id] ?? 1) * search * Math.max(0.2, samples / SAMPLES_PER_UNIT);
}
