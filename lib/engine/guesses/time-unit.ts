import type { Waveform } from '../contract/waveform';
import type { Inspiral } from '../findings/inspiral-reading';
import { scientific, short } from '../findings/spelt';
import { MSUN_S } from '../units/constants';
import type { Guess } from './guess';

/** The leading-order chirp mass of a late inspiral is right to about a tenth. */
const BAND = 1.35;
const PEAK_OMEGA = [0.25, 0.75] as const;
/** Total masses that a time in seconds may stand for; with M over D in the amplitude it can be nothing else. */
const MASSES_MSUN = [1, 2000] as const;
const ANY_MASS_MSUN = [0.1, 1e10] as const;

const between = (x: number, [low, high]: readonly [number, number]): boolean => x >= low && x <= high;

/** What else the samples say of the unit. */
export interface TimeFacts {
  /** Null where no mass ratio is declared. */
  readonly eta: number | null;
  /** Amplitudes with M over D in them, as a detector measures. */
  readonly isTiny: boolean;
}

/** Seconds that no mass of the file's own brings to M. */
export const isBare = ({ unit, ownTotalMassMsun }: Waveform): boolean => unit === 's' && ownTotalMassMsun === null;

/** M in the unit that the data seem to have, over M as declared; null where neither unit fits. */
function stretchOf(ratio: number, waveform: Waveform, isTiny: boolean): 'declared' | 'other' | null {
  const { unit, ownTotalMassMsun: mass } = waveform;
  const near = ratio < BAND && ratio > 1 / BAND;
  const asSeconds = between(ratio / MSUN_S, isTiny ? ANY_MASS_MSUN : MASSES_MSUN);
  if (isBare(waveform)) return near && !isTiny ? 'other' : between(ratio / MSUN_S, ANY_MASS_MSUN) ? 'declared' : null;
  if (near) return 'declared';
  if (unit === 'M') return asSeconds ? 'other' : null;
  const inM = mass === null ? Number.NaN : ratio * mass * MSUN_S;
  return inM < BAND && inM > 1 / BAND ? 'other' : null;
}

/** Chirp masses of mass ratios 1 to 30, with the band of leading order on either side. */
const ANY_MASS_RATIO = [0.43, 0.075] as const;

/**
 * The unit of time, by how fast the frequency of (2,2) rises and by its frequency at the peak.
 * Shape:  the reading of one inspiral, and the waveform it was read from.
 * Units:  chirp mass and frequency in M as declared.
 * Error:  leading order; a tenth in the late inspiral.
 * Fails:  null where no rise could be read, or where neither M nor seconds explains it.
 * Source: domain reference, 4.2.
 */
export function guessTimeUnit(waveform: Waveform, { chirpMass, peakOmega }: Inspiral, { eta, isTiny }: TimeFacts): Guess | null {
  if (chirpMass === null) return null;
  const declared = waveform.unit;
  // Any chirp mass that a binary may have is its own expectation.
  const possible = eta === null && chirpMass < BAND * ANY_MASS_RATIO[0] && chirpMass > ANY_MASS_RATIO[1] / BAND;
  const expected = eta === null ? (possible ? chirpMass : ANY_MASS_RATIO[0]) : eta ** 0.6;
  const ratio = chirpMass / expected;
  const found = stretchOf(ratio, waveform, isTiny);
  if (found === null) return null;
  const agrees = found === 'declared';
  const other = declared === 'M' ? 's' : 'M';
  const mass = `as seconds it is a total mass of ${short(ratio / MSUN_S)} solar masses${eta === null ? ' for equal ones' : ''}`;
  const inOther = declared === 'M' ? `; ${mass}` : '; as times in M it would fit';
  const wants = eta === null ? 'binaries have 0.08 to 0.44 M, read here to about a tenth' : `the declared mass ratio gives ${short(expected)} M`;
  // With the declared ratio of masses, Mω at the peak is the declared one times what the chirp says M is.
  const peak = agrees && !isBare(waveform) ? peakOmega : peakOmega * ratio;
  return {
    about: 'time-unit',
    convention: null,
    declared,
    proposed: agrees ? declared : other,
    value: agrees ? declared : other,
    agrees,
    confidence: between(peak, PEAK_OMEGA) ? (eta === null ? 0.9 : 0.95) : 0.6,
    reason: `The frequency of (2,2) of ${waveform.name} rises as for a chirp mass of ${scientific(chirpMass, 3)} M and ends at Mω = ${short(peak)}; ${wants}, and mergers end between 0.25 and 0.75${agrees ? (isBare(waveform) ? `; ${mass}` : '') : inOther}.`,
  };
}
