import type { Figure } from '../contract/measurement';
import { toneName } from '../tones/tone';
import type { PairPoint, PairResult } from './pair-point';

const MOST_POINTS = 1200;
const PHASE = 'phase difference, δφ';
/** Amplitudes below this share of the largest say nothing of a phase. */
const AUDIBLE = 1e-3;

/** Phase and amplitude difference against time, over the interval on which both records exist, and the window over which they were laid over each other. */
export function pairFigure({ a, b, mode, routes, settings }: PairPoint, { aligned }: PairResult): Figure {
  const { t, phase, ratio, size } = { ...routes.A().along(aligned.timeShiftM, aligned.anchorM, aligned.from, aligned.to), size: a.tones.A };
  const loudest = size.re.reduce((top, x, i) => Math.max(top, Math.hypot(x, size.im[i]!)), 0);
  const stride = Math.max(1, Math.ceil(t.length / MOST_POINTS));
  const picked = Array.from(t.keys()).filter((i) => i % stride === 0);
  let at = 0;
  const heard = picked.map((i) => {
    while (at < size.axis.length - 1 && size.axis[at + 1]! <= t[i]!) at++;
    return Math.hypot(size.re[at]!, size.im[at]!) > AUDIBLE * loudest;
  });
  const shown = (values: (i: number) => number): (number | null)[] => picked.map((i, k) => (heard[k] && Number.isFinite(values(i)) ? values(i) : null));
  const [from, to] = aligned.window;
  const inside = picked.map((i) => (t[i]! >= from && t[i]! <= to ? 0 : null));
  return {
    kind: 'curve',
    title: `${b.waveform.name} less ${a.waveform.name} after the alignment: ${toneName({ mode })}`,
    x: { label: `Time of ${a.waveform.name}`, unit: 'M', scale: 'linear', values: picked.map((i) => t[i]!) },
    series: [
      { label: 'Phase difference', quantity: PHASE, unit: 'rad', role: 'recomputed', axis: 'left', scale: 'linear', values: shown((i) => phase[i]! - aligned.phaseShift) },
      ...(settings.alignment === 'window' ? [{ label: 'Alignment window', quantity: PHASE, unit: 'rad', role: 'claimed', axis: 'left', scale: 'linear', values: inside } as const] : []),
      { label: 'Relative amplitude difference', unit: '', role: 'recomputed', axis: 'right', scale: 'linear', values: shown((i) => ratio[i]! - 1) },
    ],
  };
}
