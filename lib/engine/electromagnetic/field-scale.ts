import type { Finding } from '../contract/finding';
import type { DeclaredSettings } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import { stop } from '../tones/measure-tones';
import { fieldHatOf } from './em-units';

/** What the field and the mass of a claim do to the energy of a file. */
export interface FieldScale {
  /** By which E/M of the file is multiplied. */
  readonly factor: number;
  /** B̂ at which the number stands; null where it is not known. */
  readonly fieldHat: number | null;
  /** Field and mass at which it stands, as far as they are known. */
  readonly fieldGauss: number | null;
  readonly massMsun: number | null;
  /** rφ₂/B̂ that nobody gave a field: the number is an energy over M·B̂². */
  readonly perField: boolean;
}

const both = (fieldGauss: number | null, massMsun: number | null): number | null => (fieldGauss === null || massMsun === null ? null : fieldHatOf(fieldGauss, massMsun));

function noField(waveform: Waveform, missing: string): Finding {
  return stop('engine/no-field', waveform.name, `The claim rescales the electromagnetic energy of ${waveform.name} to another field, but ${missing}.`, 'State binary.fieldGauss and totalMassMsun beside the file, and fieldGauss with totalMassMsun in the claim; or declare neither and claim the number as it stands.');
}

/** Beside the file: B̂ as it was computed, or 1 where the amplitude is already per field. */
const hatOfFile = ({ amplitudeUnit, binary, ownTotalMassMsun }: Waveform): number | null => (amplitudeUnit === 'perField' ? 1 : both(binary.fieldGauss ?? null, ownTotalMassMsun));

/**
 * How an electromagnetic energy goes from the file's field to the claim's: with B̂². Declared settings
 * come before the file's own; with neither declared the number stands as it is. A mass alone turns a
 * geometric energy into erg, for B̂ of the file is what it is; where the file states its field, the mass
 * changes B̂ as well.
 * Shape:  one factor, and where the number then stands.
 * Units:  gauss, M☉.
 * Error:  rounding.
 * Fails:  engine/no-field when a rescaling is asked for and the field or mass of either end is not known.
 * Source: settings.md section 7; domain reference Q23, Q24.
 */
export function fieldScale(waveform: Waveform, declared: DeclaredSettings, swept: boolean): FieldScale | Finding {
  const { name, amplitudeUnit, binary, ownTotalMassMsun } = waveform;
  const perField = amplitudeUnit === 'perField';
  const fieldGauss = declared.fieldGauss ?? binary.fieldGauss ?? null;
  const massMsun = declared.totalMassMsun ?? ownTotalMassMsun;
  const fieldHat = both(fieldGauss, massMsun);
  const asked = declared.fieldGauss !== undefined || declared.totalMassMsun !== undefined;
  if (!asked) return perField ? { factor: 1, fieldHat: null, fieldGauss: null, massMsun: null, perField } : { factor: 1, fieldHat, fieldGauss, massMsun, perField };
  const own = hatOfFile(waveform);
  const massAlone = declared.fieldGauss === undefined;
  if (massAlone && own === null && !swept) return { factor: 1, fieldHat, fieldGauss, massMsun, perField };
  if (own === null) return noField(waveform, `the sheet does not state the field and the mass at which ${name} was computed`);
  if (fieldHat === null) return noField(waveform, massMsun === null ? 'no total mass is known for it' : 'no field is known for it');
  return { factor: (fieldHat / own) ** 2, fieldHat, fieldGauss, massMsun, perField: false };
}
