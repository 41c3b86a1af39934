import type { Figure } from '../contract/measurement';
import { polarOf } from '../series/polar';
import { stretchOf, type Tone } from '../tones/tone';
import { windowSamples, type RingdownLine } from './line-on-samples';
import type { FitWindow } from './ringdown-point';

/** Shown on either side of the window. */
const AROUND_M = 25;
const MOST_POINTS = 1200;
const AMPLITUDE = 'amplitude, r|h|/M';

/** Means of phase and ln|H| over the window: where the two lines cross its middle. */
function middles(tone: Tone, { from, to }: FitWindow): { readonly level: number; readonly angle: number } {
  const { tone: inside, weights, length } = windowSamples(tone, from, to, 8);
  const { amplitude, phase } = polarOf(inside);
  let [level, angle] = [0, 0];
  for (let i = 0; i < weights.length; i++) {
    level += (weights[i]! * Math.log(amplitude[i]!)) / length;
    angle += (weights[i]! * phase[i]!) / length;
  }
  return { level, angle };
}

/**
 * Amplitude around the window with the fitted decay, and what the fitted line leaves of the phase.
 * Shape:  thinned to a screen's width.
 * Units:  M from the peak; amplitudes in r·h/M, phase in rad.
 * Error:  for eyes alone.
 * Fails:  never.
 * Source: Q18.
 */
export function ringdownFigure(tone: Tone, window: FitWindow, { omega, gamma }: RingdownLine, title: string): Figure {
  const { from, to, peakM } = window;
  const shown = stretchOf(tone, from - AROUND_M, to + AROUND_M, 0);
  const stride = Math.max(1, Math.ceil(shown.axis.length / MOST_POINTS));
  const { amplitude } = polarOf(shown);
  const { level, angle } = middles(tone, window);
  const middle = (from + to) / 2;
  const picked = Array.from(shown.axis.keys()).filter((i) => i % stride === 0 && amplitude[i]! > 0);
  const inside = (i: number): boolean => shown.axis[i]! >= from && shown.axis[i]! <= to;
  const left = (i: number): number => {
    const phase = Math.atan2(shown.im[i]!, shown.re[i]!) - angle + omega * (shown.axis[i]! - middle);
    return phase - 2 * Math.PI * Math.round(phase / (2 * Math.PI));
  };
  return {
    kind: 'waveforms',
    title,
    x: { label: 'Time from the peak', unit: 'M', scale: 'linear', values: picked.map((i) => shown.axis[i]! - peakM) },
    series: [
      { label: 'Amplitude in the file', quantity: AMPLITUDE, unit: '', role: 'claimed', axis: 'left', scale: 'log', values: picked.map((i) => amplitude[i]!) },
      { label: 'Fitted decay', quantity: AMPLITUDE, unit: '', role: 'recomputed', axis: 'left', scale: 'log', values: picked.map((i) => (inside(i) ? Math.exp(level - gamma * (shown.axis[i]! - middle)) : null)) },
      { label: 'Phase less the fitted line', unit: 'rad', role: 'residual', axis: 'right', scale: 'linear', values: picked.map((i) => (inside(i) ? left(i) : null)) },
    ],
  };
}
