import type { Figure } from '../contract/measurement';
import { scientific } from '../findings/spelt';
import { peakOnSamples } from '../tones/peak';
import { hzPerOmega, type FrequencyPoint } from './frequency-point';
import { frequencyTrack } from './tone-frequency';
import { plasmaCutoffHz } from './em-units';

const MOST_POINTS = 1200;

/**
 * The frequency from sample to sample, with the value that was read and the cut-off of the plasma.
 * Shape:  thinned to a screen's width.
 * Units:  M from the peak; Hz.
 * Error:  for eyes alone.
 * Fails:  never.
 * Source: Q25.
 */
export function frequencyFigure(point: FrequencyPoint, valueHz: number): Figure {
  const { tones, peakTones, completed } = point.ringdown;
  const { axis } = tones.A;
  const track = frequencyTrack(tones.A);
  const zero = peakOnSamples(peakTones.A) ?? 0;
  const stride = Math.max(1, Math.ceil(axis.length / MOST_POINTS));
  const picked = Array.from(axis.keys()).filter((i) => i % stride === 0);
  const hz = hzPerOmega(point.totalMassMsun);
  const drawn = { quantity: 'frequency f', unit: 'Hz', axis: 'left', scale: 'log' } as const;
  const flat = (value: number): number[] => picked.map(() => value);
  return {
    kind: 'curve',
    title: `Frequency of the (2,2) mode of ${completed.waveform.name} at ${scientific(point.totalMassMsun)} M☉, and the cut-off of a plasma`,
    x: { label: 'Time from the peak', unit: 'M', scale: 'linear', values: picked.map((i) => axis[i]! - zero) },
    series: [
      { ...drawn, label: 'Frequency in the file', role: 'recomputed', values: picked.map((i) => (track[i] != null && track[i]! > 0 ? hz * track[i]! : null)) },
      { ...drawn, label: 'Value that was read', role: 'recomputed', values: flat(valueHz) },
      { ...drawn, label: `Cut-off at ${scientific(point.plasmaDensityCm3)} electrons in a cm³`, role: 'noise', values: flat(plasmaCutoffHz(point.plasmaDensityCm3)) },
    ],
  };
}
