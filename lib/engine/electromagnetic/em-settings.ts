import type { UsedRow } from '../tones/used-rows';
import type { EmPoint } from './em-point';

/** Field, mass, start and tetrad as a reader sees them; what the file brings along is not an assumption. */
export function emRows({ source, scale }: EmPoint): UsedRow[] {
  const { fieldGauss, massMsun } = scale;
  return [
    ...(fieldGauss === null ? [] : [{ name: 'fieldGauss', value: fieldGauss, unit: 'G', matters: false } as const]),
    ...(massMsun === null ? [] : [{ name: 'totalMassMsun', value: massMsun, unit: 'M☉', matters: false } as const]),
    { name: 'startM', value: source.startM, unit: 'M', matters: source.waveform.junkEndM === null },
    ...(source.waveform.tetrad === undefined ? [{ name: 'tetrad', value: 'symmetric', matters: true } as const] : []),
  ];
}
