import { completeModes } from '../conditioning/complete-modes';
import type { DeclaredSettings } from '../contract/settings';
import type { Mode, Waveform } from '../contract/waveform';
import { defaultFloor } from '../radiation/integration-floor';
import { houseSamples, radiationOnSamples } from '../radiation/news-on-samples';
import { radiationRecord } from '../radiation/radiation-record';

/**
 * The record as it would be at infinite radius by perturbation theory from this radius alone: every mode becomes
 * (1 − 2M/r)[X − (ℓ−1)(ℓ+2)/(2r) ∫X dt]. Linear and constant in time, it holds for ψ4, news and strain alike.
 * Shape:  the same modes on the grid of the integration.
 * Units:  r areal, in M; samples as in the record brought to M.
 * Error:  terms of order 1/r² beyond the leading ones; that of the integration's floor.
 * Fails:  null for what holds no modes in M, or whose phase does not move.
 * Source: Nakano et al. 2015, arXiv:1503.00718 (abstract read; the form from memory).
 */
export function atInfinity(waveform: Waveform, arealRadius: number, declared: DeclaredSettings): Waveform | null {
  const completed = completeModes(waveform).waveform;
  const record = radiationRecord(completed);
  if ('saw' in record) return null;
  const floor = declared.integrationFloor ?? defaultFloor(record, declared.startM ?? waveform.junkEndM ?? record.axis[0]!);
  if (floor === null) return null;
  // One integral, whatever the variable: that of news to strain.
  const { axis, news, strain } = radiationOnSamples({ ...record, variable: 'news' }, floor, houseSamples, true);
  const modes = news.map(({ l, m, re, im }, k): Mode => {
    const share = ((l - 1) * (l + 2)) / (2 * arealRadius);
    const corrected = (x: Float64Array, integral: Float64Array): Float64Array => x.map((value, i) => (1 - 2 / arealRadius) * (value - share * integral[i]!));
    return { l, m, re: corrected(re, strain![k]!.re), im: corrected(im, strain![k]!.im) };
  });
  return { ...waveform, unit: 'M', amplitudeUnit: 'rh/M', axis, uniformStep: (axis[axis.length - 1]! - axis[0]!) / (axis.length - 1), content: { kind: 'modes', modes }, negativeM: 'given' };
}
