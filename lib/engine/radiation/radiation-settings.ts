import type { CompletedModes } from '../conditioning/complete-modes';
import { houseValues } from '../contract/house-values';
import type { UsedSetting } from '../contract/measurement';
import type { MeasureRequest } from '../contract/quantity';
import type { DeclaredSettings, ModeIndex, SettingName } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import type { BinaryParameters } from '../synthesis/binary';
import type { BeforeRule } from './energy-before';
import { defaultFloor } from './integration-floor';
import { divisionsTo, type RadiationRecord } from './radiation-record';
import type { RadiationRecipe } from './radiation-recipe';
import { mirrorRows, usedSettings, type UsedRow } from '../tones/used-rows';

/** Everything a point of a claim of this family rests on, defaults filled in. */
export interface RadiationSettings {
  readonly modes: 'all' | readonly ModeIndex[];
  readonly lMax: number | null;
  readonly startM: number;
  /** ω₀ in rad/M for |m| = 2; null when nothing is integrated. */
  readonly floor: number | null;
  readonly rule: BeforeRule;
  readonly normaliseBy: 'M' | 'adm' | 'remnant';
  /** Null when the mass ratio is not known. */
  readonly binary: BinaryParameters | null;
}

export function binaryOfClaim(declared: DeclaredSettings, waveform: Waveform): BinaryParameters | null {
  const massRatio = declared.massRatio ?? waveform.binary.massRatio;
  if (massRatio === undefined) return null;
  return { massRatio, chi1z: declared.chi1z ?? waveform.binary.chi1z ?? 0, chi2z: declared.chi2z ?? waveform.binary.chi2z ?? 0 };
}

/**
 * Settings of one point, defaults filled in; the record is needed where a default is read from the data.
 * Shape:  one value a setting.
 * Units:  startM in M, floor in rad/M.
 * Error:  none.
 * Fails:  never; a floor that cannot be read is null.
 * Source: settings.md section 1.
 */
export function radiationSettings(declared: DeclaredSettings, waveform: Waveform, record: RadiationRecord, recipe: RadiationRecipe): RadiationSettings {
  const startM = declared.startM ?? waveform.junkEndM ?? record.axis[0]!;
  return {
    modes: declared.modes ?? houseValues.modes,
    lMax: declared.lMax ?? null,
    startM,
    floor: divisionsTo(record.variable, recipe.withStrain) > 0 ? (declared.integrationFloor ?? defaultFloor(record, startM)) : null,
    rule: declared.includeEnergyBeforeStart ?? houseValues.includeEnergyBeforeStart,
    normaliseBy: declared.normaliseBy ?? recipe.normaliseBy,
    binary: binaryOfClaim(declared, waveform),
  };
}

function rowsOf(used: RadiationSettings, waveform: Waveform, record: RadiationRecord): UsedRow[] {
  // Without a stated remnant its mass is what is left of M, which differs from M as well.
  const knowsOtherMass = used.normaliseBy === 'remnant' || waveform.binary.admEnergy !== undefined || waveform.binary.remnantMass !== undefined;
  const evolves = used.rule === 'removed';
  const rows: UsedRow[] = [
    { name: 'modes', value: used.modes, matters: record.modes.length > 1 },
    { name: 'startM', value: used.startM, unit: 'M', matters: waveform.junkEndM === null },
    { name: 'includeEnergyBeforeStart', value: used.rule, matters: true },
    { name: 'normaliseBy', value: used.normaliseBy, matters: knowsOtherMass },
  ];
  if (used.lMax !== null) rows.push({ name: 'lMax', value: used.lMax, matters: true });
  if (used.floor !== null) rows.push({ name: 'integrationFloor', value: used.floor, unit: 'rad/M', matters: true });
  if (used.rule !== false && used.binary !== null) {
    const { massRatio, chi1z, chi2z } = used.binary;
    rows.push({ name: 'massRatio', value: massRatio, matters: false });
    rows.push({ name: 'chi1z', value: chi1z, matters: evolves && waveform.binary.chi1z === undefined });
    rows.push({ name: 'chi2z', value: chi2z, matters: evolves && waveform.binary.chi2z === undefined });
  }
  return rows;
}

/**
 * The settings as a reader sees them, and the names of house defaults that could change the value.
 * Shape:  one row a setting; swept ones are marked.
 * Units:  beside each value.
 * Error:  none.
 * Fails:  never.
 * Source: settings.md section 1 (the mark ●).
 */
export function settingsUsed(used: RadiationSettings, request: MeasureRequest, { waveform, mirrorAssumed }: CompletedModes, record: RadiationRecord, allowed: readonly SettingName[], more: readonly UsedRow[] = []): { readonly settings: UsedSetting[]; readonly assumed: string[] } {
  const rows = rowsOf(used, waveform, record).filter(({ name }) => (allowed as readonly string[]).includes(name));
  return usedSettings([...rows, ...more, ...mirrorRows({ mirrorAssumed }, record.modes)], request);
}
