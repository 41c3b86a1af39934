import type { Figure } from '../contract/measurement';
import { scientific } from '../findings/spelt';
import { interpolatePair } from '../series/local-interpolation';
import { stretchOf, toneName } from '../tones/tone';
import type { MirrorWindow } from './mirror-by-routes';
import type { MirrorPoint } from './mirror-point';

const MOST_POINTS = 1200;
/** Shown on either side of the window. */
const AROUND_M = 40;

/**
 * Both amplitudes over each other, φ₂ divided by the mean ratio, and the phase that is left between them.
 * Shape:  thinned to a screen's width, on the samples of ψ₄.
 * Units:  M from the peak; r·M·ψ₄; rad.
 * Error:  for eyes alone.
 * Fails:  never.
 * Source: Q27.
 */
export function mirrorFigure(point: MirrorPoint, { from, to, shiftM, peakM }: MirrorWindow & { readonly peakM: number }, meanRatio: number): Figure {
  const { em, gw, emWaveform, gwWaveform } = point;
  const shown = stretchOf(gw.A, from - AROUND_M, to + AROUND_M, 0);
  const stride = Math.max(1, Math.ceil(shown.axis.length / MOST_POINTS));
  const picked = Array.from(shown.axis.keys()).filter((i) => i % stride === 0);
  const [first, last] = [em.axis[0]!, em.axis[em.axis.length - 1]!];
  const light = picked.map((i): readonly [number, number] | null => {
    const t = shown.axis[i]! + shiftM;
    if (t < first || t > last) return null;
    const [re, im] = interpolatePair({ axis: em.axis, first: em.re, second: em.im }, { t0: t, dt: 1, n: 1 }, 4);
    return [re[0]!, im[0]!];
  });
  const left = (i: number, at: readonly [number, number]): number => Math.atan2(at[1] * shown.re[i]! - at[0] * shown.im[i]!, at[0] * shown.re[i]! + at[1] * shown.im[i]!);
  const drawn = { quantity: 'amplitude, |ψ₄|', unit: '', axis: 'left', scale: 'log' } as const;
  return {
    kind: 'waveforms',
    title: `Amplitudes of ${toneName(point)}: ${gwWaveform.name}, and ${emWaveform.name} over ${scientific(meanRatio, 3)}`,
    x: { label: 'Time from the peak', unit: 'M', scale: 'linear', values: picked.map((i) => shown.axis[i]! - peakM) },
    series: [
      { ...drawn, label: 'Gravitational, |ψ₄|', role: 'claimed', values: picked.map((i) => Math.hypot(shown.re[i]!, shown.im[i]!)).map((v) => (v > 0 ? v : null)) },
      { ...drawn, label: 'Electromagnetic, |φ₂| over the mean ratio', role: 'recomputed', values: light.map((at) => (at === null || !(Math.hypot(...at) > 0) ? null : Math.hypot(...at) / meanRatio)) },
      { label: 'Phase between them', unit: 'rad', role: 'residual', axis: 'right', scale: 'linear', values: picked.map((i, k) => (light[k] == null ? null : left(i, light[k]))) },
    ],
  };
}
