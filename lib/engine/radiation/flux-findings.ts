import type { Finding } from '../contract/finding';
import type { Waveform } from '../contract/waveform';
import { centreDriftFindings } from '../findings/centre-drift';
import { driftFindings } from '../findings/drift';
import { lateFindings } from '../findings/late-findings';
import { recordFindings } from '../findings/record-findings';
import type { SampledRadiation } from './news-on-samples';
import type { RadiationRecord } from './radiation-record';

export interface FluxLook {
  /** As the file gives it, before modes were completed. */
  readonly given: Waveform;
  /** The modes in use, in M. */
  readonly record: RadiationRecord;
  readonly radiation: SampledRadiation;
  /** Is it integrated to the last sample? */
  readonly toTheEnd: boolean;
}

/**
 * What every sum over modes asks of its record: V06, V10, V15, V16, V17 and V21, and V11 and V12 where
 * it is integrated to the end. V04, V09, V13 and V14 stand beside it, because they know the quantity.
 * Shape:  a list, empty when there is nothing to say.
 * Units:  as FluxLook.
 * Error:  none: thresholds only.
 * Fails:  never.
 * Source: domain reference 4.3; settings.md section 8.
 */
export function fluxFindings({ given, record, radiation, toTheEnd }: FluxLook): Finding[] {
  const { name } = given;
  const uses = (l: number, m: number): boolean => record.modes.some((mode) => mode.l === l && mode.m === m);
  const integrated = record.variable === 'strain' ? null : radiation.strain;
  return [
    ...recordFindings(given, uses),
    ...centreDriftFindings(record.axis, record.modes, name),
    ...(integrated === null ? [] : driftFindings(radiation.axis, 'M', integrated, name, true)),
    ...(toTheEnd ? lateFindings(radiation.axis, radiation.news, name) : []),
  ];
}
