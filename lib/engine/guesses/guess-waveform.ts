import type { Waveform } from '../contract/waveform';
import { peakOf } from '../findings/loud-modes';
import { readInspiral } from '../findings/inspiral-reading';
import { radiationRecord } from '../radiation/radiation-record';
import { guessAmplitude, TINY } from './amplitude';
import type { Guess } from './guess';
import { guessMirror } from './mirror';
import { guessRotation } from './rotation';
import { guessTimeUnit, isBare } from './time-unit';

/** Seconds without a mass cannot be brought to M: then the question is whether they are M already. */
const asM = (waveform: Waveform): Waveform => (isBare(waveform) ? { ...waveform, unit: 'M', amplitudeUnit: 'rh/M' } : waveform);

/** What the inspiral shows of the unit of time, and of the amplitude once that holds. */
function byInspiral(waveform: Waveform): (Guess | null)[] {
  const { massRatio } = waveform.binary;
  if (waveform.content.kind !== 'modes') return [];
  const quadrupole = waveform.content.modes.filter(({ l, m }) => l === 2 && m === 2);
  const record = radiationRecord({ ...asM(waveform), content: { kind: 'modes', modes: quadrupole } });
  const inspiral = 'saw' in record ? null : readInspiral(record);
  if ('saw' in record || inspiral === null) return [];
  const eta = massRatio === undefined || !(massRatio > 0) ? null : massRatio / (1 + massRatio) ** 2;
  const time = guessTimeUnit(waveform, inspiral, { eta, isTiny: Math.max(...quadrupole.map(peakOf)) < TINY });
  // A chirp that the declared unit of time does not explain makes every amplitude meaningless.
  const { reading, chirpMass } = inspiral;
  const timed = time?.agrees === true && !isBare(waveform) && reading !== null && chirpMass !== null;
  return [time, timed ? guessAmplitude(waveform.name, reading, record.variable, eta ?? Math.min(0.25, chirpMass ** (5 / 3)), eta === null) : null];
}

/**
 * Conventions of one waveform as its samples show them, in the order rotation, modes of m < 0, time, amplitude.
 * Shape:  modes against time; anything else gives no guess.
 * Units:  as declared beside the file.
 * Error:  each guess states its confidence and its reason.
 * Fails:  never; where the data cannot tell there is no guess.
 * Source: domain reference, 4.2.
 */
export function guessWaveform(waveform: Waveform): readonly Guess[] {
  return [guessRotation(waveform), guessMirror(waveform), ...byInspiral(waveform)].filter((guess) => guess !== null);
}
