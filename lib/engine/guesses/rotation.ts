import type { Waveform } from '../contract/waveform';
import { percent, short } from '../findings/spelt';
import type { Guess } from './guess';

/** Steps that turn further than this may have turned the other way. */
const MOST_TURN_RAD = 2;
const LEAST_STEPS = 16;
/** So many of the steps must turn the way that the median does. */
const CLEAR = 0.95;
const LIKELY = 0.75;

/** How far arg H₂₂ turns from sample to sample, over the middle half. */
function turns(re: Float64Array, im: Float64Array): number[] {
  const found: number[] = [];
  for (let i = Math.max(1, re.length >> 2); i < Math.floor(0.75 * re.length); i++) {
    const [across, along] = [im[i]! * re[i - 1]! - re[i]! * im[i - 1]!, re[i]! * re[i - 1]! + im[i]! * im[i - 1]!];
    if (across !== 0 || along !== 0) found.push(Math.atan2(across, along));
  }
  return found;
}

/**
 * Which way (2,2) turns; the house has it fall, H₂₂ ∝ e^{−iφ}.
 * Shape:  modes against time that hold (2,2); the middle half of the samples.
 * Units:  any unit of time.
 * Error:  sampling too coarse to tell the sense gives no guess.
 * Fails:  null without (2,2), with too few samples, or where the steps do not turn one way.
 * Source: domain reference, 4.2 and convention C22.
 */
export function guessRotation({ name, domain, content }: Waveform): Guess | null {
  const mode = domain === 'time' && content.kind === 'modes' ? content.modes.find(({ l, m }) => l === 2 && m === 2) : undefined;
  if (mode === undefined) return null;
  const steps = turns(mode.re, mode.im).sort((a, b) => a - b);
  const median = steps[steps.length >> 1];
  if (median === undefined || steps.length < LEAST_STEPS || median === 0 || Math.abs(median) > MOST_TURN_RAD) return null;
  const share = steps.filter((x) => x * median > 0).length / steps.length;
  if (share < LIKELY) return null;
  const agrees = median < 0;
  // With both signs of m there, exchanged labels turn it round as well: the samples cannot tell which.
  const both = !agrees && content.kind === 'modes' && content.modes.some(({ l, m }) => l === 2 && m === -2);
  return {
    about: 'rotation',
    convention: 'C22',
    declared: 'H₂₂ turning as e^(−iφ)',
    proposed: agrees ? 'H₂₂ turning as e^(−iφ)' : 'the other sense, H₂₂ turning as e^(+iφ)',
    value: agrees ? 'as-declared' : 'reversed',
    agrees,
    confidence: share >= CLEAR ? (both ? 0.8 : 0.95) : 0.6,
    reason: `Over the middle half of ${name} arg H₂₂ turns by ${short(median).replace('-', '−')} rad a sample (median; ${percent(share)} of the steps the same way), read as the sheet says; a negative number is expected.${both ? ' Labels m and −m that changed places (C23) would show the same.' : ''}`,
  };
}
