import type { Waveform } from '../contract/waveform';
import type { Inspiral } from '../findings/inspiral-reading';
import { scientific, short } from '../findings/spelt';
import { MSUN_S } from '../units/constants';
import type { Guess } from './guess';

/** The leading-order chirp mass of a late inspiral is right to about a tenth. */
const BAND = 1.35;
const PEAK_OMEGA = [0.25, 0.75] as const;
/** Total masses that a time in seconds may stand for. */
const MASSES_MSUN = [1, 2000] as const;

const between = (x: number, [low, high]: readonly [number, number]): boolean => x >= low && x <= high;

/** M in the unit that the data seem to have, over M as declared; null where neither unit fits. */
function stretchOf(ratio: number, { unit, ownTotalMassMsun: mass }: Waveform): 'declared' | 'other' | null {
  if (ratio < BAND && ratio > 1 / BAND) return 'declared';
  if (unit === 'M') return between(ratio / MSUN_S, MASSES_MSUN) ? 'other' : null;
  const inM = mass === null ? Number.NaN : ratio * mass * MSUN_S;
  return inM < BAND && inM > 1 / BAND ? 'other' : null;
}

/**
 * The unit of time, by how fast the frequency of (2,2) rises and by its frequency at the peak.
 * Shape:  the reading of one inspiral, and the waveform it was read from.
 * Units:  chirp mass and frequency in M as declared.
 * Error:  leading order; a tenth in the late inspiral.
 * Fails:  null where no rise could be read, or where neither M nor seconds explains it.
 * Source: domain reference, 4.2.
 */
export function guessTimeUnit(waveform: Waveform, { chirpMass, peakOmega }: Inspiral, eta: number): Guess | null {
  if (chirpMass === null) return null;
  const [expected, declared] = [eta ** 0.6, waveform.unit];
  const ratio = chirpMass / expected;
  const found = stretchOf(ratio, waveform);
  if (found === null) return null;
  const agrees = found === 'declared';
  const other = declared === 'M' ? 's' : 'M';
  const inOther = declared === 'M' ? `; as seconds it is a total mass of ${short(ratio / MSUN_S)} solar masses` : '; as times in M it would fit';
  // With the declared ratio of masses, Mω at the peak is the declared one times what the chirp says M is.
  const peak = agrees ? peakOmega : peakOmega * ratio;
  return {
    about: 'time-unit',
    convention: 'C12',
    declared,
    proposed: agrees ? declared : other,
    agrees,
    confidence: between(peak, PEAK_OMEGA) ? 0.95 : 0.6,
    reason: `The frequency of (2,2) of ${waveform.name} rises as for a chirp mass of ${scientific(chirpMass, 3)} M and ends at Mω = ${short(peak)}; the declared mass ratio gives ${short(expected)} M, and mergers end between 0.25 and 0.75${agrees ? '' : inOther}.`,
  };
}
