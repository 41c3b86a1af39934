import { powerOfTwoFrom } from '@/lib/engine/fourier/transform';
import type { SampleGrid, TimeSource } from './time-source';

/** Content is taken to die by four times the frequency where the signal is strongest; the spectrum is checked afterwards. */
const CONTENT_OVER_FASTEST = 4;
/** Room between where content dies and the grid's own Nyquist frequency. */
const ROOM = 1.4;
/** Longest resampled series: beyond it the step stays, and the content left out shows in the error bar. */
export const MOST_SAMPLES = 1 << 21;

/** The step to start from, before any halving. */
export const firstStep = (source: TimeSource): number =>
  source.fastest > 0 ? Math.min(source.span / 16, 1 / (2 * ROOM * CONTENT_OVER_FASTEST * source.fastest)) : source.span / 16;

/** Samples may be used as they stand, thinned by a power of two, when they are evenly spaced and fine enough. */
export function strideFor(source: TimeSource, halvings: number): number | null {
  const step = source.waveform.uniformStep;
  if (step === null) return null;
  let stride = 1;
  while (2 * stride * step <= firstStep(source) && (source.axis.length - 1) / (2 * stride) >= 32) stride *= 2;
  for (let i = 0; i < halvings; i++) stride /= 2;
  return stride >= 1 ? stride : null;
}

/**
 * The uniform grid on which a record is transformed.
 * Shape:  starts at the first sample; the last grid point lies less than a step before the record's end.
 * Units:  the waveform's own time; binSpacing is in cycles per unit.
 * Error:  none of its own; `halvings` is turned until the spectrum's upper end is empty.
 * Fails:  never.
 * Source: engine design: the step is chosen from the measured spectrum.
 */
export function sampleGrid(source: TimeSource, binSpacing: number, halvings: number): SampleGrid {
  const { axis, span } = source;
  const t0 = axis[0]!;
  const tEnd = axis[axis.length - 1]!;
  const stride = strideFor(source, halvings);
  if (stride !== null) {
    const dt = source.waveform.uniformStep! * stride;
    return { t0, dt, n: Math.floor((axis.length - 1) / stride) + 1, tEnd, stride };
  }
  const wanted = interpolatedStep(source, halvings);
  // A step that makes the transform a power of two long, so that neighbouring bins are exactly binSpacing apart.
  const size = powerOfTwoFrom(Math.ceil(1 / (binSpacing * wanted)));
  const dt = 1 / (binSpacing * size);
  return { t0, dt, n: Math.floor((span / dt) * (1 + 1e-13)) + 1, tEnd, stride: null };
}

/** An even record that has come down to its own step is interpolated below it; an uneven one starts from the first step. */
function interpolatedStep(source: TimeSource, halvings: number): number {
  const step = source.waveform.uniformStep;
  if (step === null) return firstStep(source) / 2 ** halvings;
  return step / 2 ** (halvings - Math.log2(strideFor(source, 0)!));
}
