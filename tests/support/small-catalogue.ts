import type { Catalogue } from '@/lib/claims/catalogue';
import type { Measurement } from '@/lib/engine/contract/measurement';
import type { MeasureRequest, Quantity, Role, Watch } from '@/lib/engine/contract/quantity';
import type { SettingName } from '@/lib/engine/contract/settings';
import { settingsTable } from '@/lib/engine/quantities/settings-table';

/** A catalogue whose quantities are described as the format describes them, with a measurement that a test supplies. */
export type Measure = (request: MeasureRequest, watch: Watch) => Measurement;

const detector: readonly SettingName[] = ['totalMassMsun', 'massFrame', 'redshift', 'distanceMpc', 'fLowHz', 'fHighHz', 'inclinationRad', 'azimuthRad', 'response', 'modes', 'lMax', 'taper'];
const noMeasure: Measure = () => {
  throw new Error('this test measures nothing');
};

const quantity = (id: string, roles: readonly Role[], extra: readonly SettingName[], measure: Measure): Quantity => ({
  id,
  title: id,
  symbol: 'x',
  unit: '',
  roles,
  needsNoise: id !== 'radiated-energy',
  settings: id === 'radiated-energy' ? ['modes', 'lMax', 'startM'] : [...detector, ...extra],
  required: (inputs, declared, over) => {
    const inM = [inputs.of.a, inputs.of.b].some((w) => w?.unit === 'M');
    const needed: SettingName[] = id === 'radiated-energy' || !inM ? [] : id === 'snr' ? ['totalMassMsun', 'distanceMpc'] : ['totalMassMsun'];
    return needed.filter((name) => declared[name] === undefined && over !== name);
  },
  sweepable: id === 'radiated-energy' ? ['startM', 'lMax'] : ['totalMassMsun', 'fLowHz', 'fHighHz', 'distanceMpc', 'inclinationRad'],
  scale: 'absolute',
  naturalTolerance: (value) => 0.01 * Math.abs(value),
  formula: 'x',
  measure,
});

export function smallCatalogue(measure: Measure = noMeasure): Catalogue {
  const quantities = [
    quantity('match', ['a', 'b'], ['maximise', 'templateMassRange'], measure),
    quantity('overlap', ['a', 'b'], [], measure),
    quantity('snr', ['a'], ['average', 'detectors', 'armAngleDeg', 'threshold', 'cosmology'], measure),
    quantity('radiated-energy', ['a'], [], measure),
  ];
  return { quantities: new Map(quantities.map((q) => [q.id, q])), settings: settingsTable, curves: ['G2', 'G1', 'SB'] };
}
