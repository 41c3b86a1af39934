import type { Band } from '../../contract/route';
import { frequencyNodes, type FrequencyNodes } from './frequency-panels';
import type { RouteBKnobs, Source } from './spectrum';

/** Turns of the integrand that nodes follow up to the band's end. A power has none of the delays of a file in frequency, only those between its parts. */
const MOST_TURNS = 1 << 19;

export interface NodeWishes {
  /** One source against itself: lags beyond MOST_TURNS of the highest frequency are not followed. */
  readonly power?: boolean;
  /** Read every mode of each source, not only its line of sight. */
  readonly allModes?: boolean;
  /** Lag in s beyond the longest record: between records that no shift removes, or that a free shift opens. */
  readonly extraLagS?: number;
}

/**
 * Quadrature nodes that serve several sources at once, up to where each has ended: at the band's
 * edge, at its Nyquist frequency, or where its content ends.
 * Shape:  ascending nodes; empty when nothing lies in the band.
 * Units:  Hz.
 * Error:  see frequencyNodes and liveHigh.
 * Fails:  never.
 * Source: settings.md rule 2.5.
 */
export function nodesFor(sources: readonly Source[], band: Band, knobs: RouteBKnobs, wishes: NodeWishes = {}): FrequencyNodes {
  const { noise, fLowHz, fHighHz } = band;
  const psd = (f: number): number => noise.psd(Math.min(Math.max(f, noise.fLowHz), noise.fHighHz));
  const top = Math.min(fHighHz, Math.max(...sources.map((source) => source.nyquistHz)));
  const nowhere = { f: new Float64Array(0), weight: new Float64Array(0) };
  if (!(top > fLowHz)) return nowhere;
  const lives = sources.map((source) => (source.nyquistHz > fLowHz ? source.liveHighHz(psd, fLowHz, top, wishes.allModes ?? false) : fLowHz));
  const high = Math.min(Math.max(...lives), top);
  const lag = Math.max(...sources.map((source) => source.spanS)) + (wishes.extraLagS ?? 0);
  const followed = wishes.power && sources.every(({ givenInFrequency }) => givenInFrequency) ? Math.min(lag, MOST_TURNS / high) : lag;
  return frequencyNodes(band, high, Math.max(followed, 1e-9), knobs.quadrature);
}
