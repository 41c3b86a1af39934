import type { Waveform } from '../contract/waveform';
import { readInspiral } from '../findings/inspiral-reading';
import { radiationRecord } from '../radiation/radiation-record';
import { guessAmplitude } from './amplitude';
import type { Guess } from './guess';
import { guessRotation } from './rotation';
import { guessTimeUnit } from './time-unit';

/** What the inspiral shows, where the mass ratio is declared and M can be reached. */
function byInspiral(waveform: Waveform): (Guess | null)[] {
  const { massRatio } = waveform.binary;
  if (waveform.content.kind !== 'modes' || massRatio === undefined || !(massRatio > 0)) return [];
  const quadrupole = waveform.content.modes.filter(({ l, m }) => l === 2 && m === 2);
  const record = radiationRecord({ ...waveform, content: { kind: 'modes', modes: quadrupole } });
  const inspiral = 'saw' in record ? null : readInspiral(record);
  if ('saw' in record || inspiral === null) return [];
  const eta = massRatio / (1 + massRatio) ** 2;
  const time = guessTimeUnit(waveform, inspiral, eta);
  // A chirp that the declared unit of time does not explain makes every amplitude meaningless.
  const { reading } = inspiral;
  const timed = time?.agrees === true && reading !== null;
  return [time, timed ? guessAmplitude(waveform.name, reading, record.variable, eta) : null];
}

/**
 * Conventions of one waveform as its samples show them, in the order rotation, time, amplitude.
 * Shape:  modes against time; anything else gives no guess.
 * Units:  as declared beside the file.
 * Error:  each guess states its confidence and its reason.
 * Fails:  never; where the data cannot tell there is no guess.
 * Source: domain reference, 4.2.
 */
export function guessWaveform(waveform: Waveform): readonly Guess[] {
  return [guessRotation(waveform), ...byInspiral(waveform)].filter((guess) => guess !== null);
}
