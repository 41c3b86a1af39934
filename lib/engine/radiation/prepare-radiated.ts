import { houseValues } from '../contract/house-values';
import type { Finding } from '../contract/finding';
import type { MeasureRequest } from '../contract/quantity';
import type { DeclaredSettings } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import { selectModes } from '../conditioning/select-modes';
import type { RadiationRecipe } from './radiation-recipe';
import { radiationSettings, type RadiationSettings } from './radiation-settings';
import { divisionsTo, radiationRecord, type RadiationRecord } from './radiation-record';
import type { Place } from '@/lib/kernel/place';

export type At = Place;

/** One point ready to be computed, or the reasons why not. */
export interface PreparedPoint {
  readonly at: At;
  readonly declared: DeclaredSettings;
  readonly record: RadiationRecord;
  /** All modes of the file, whatever modes the claim then uses. */
  readonly whole: RadiationRecord;
  readonly settings: RadiationSettings;
  /** Mass to which the number is referred, in M. */
  readonly norm: number;
  /** The remnant's mass is not stated: what is radiated goes off `norm`. */
  readonly lessRadiated: boolean;
}

export const stop = (code: string, where: string, text: string, fix: string): Finding => ({ code, level: 'stops-lodging', where, text, fix });

interface Norm {
  readonly norm: number;
  readonly lessRadiated: boolean;
}

function normOf(settings: RadiationSettings, waveform: Waveform, recipe: RadiationRecipe): Norm | Finding {
  const { admEnergy, remnantMass } = waveform.binary;
  // Where the remnant is the house choice, M less what was radiated stands for it.
  if (settings.normaliseBy === 'remnant' && remnantMass === undefined && recipe.normaliseBy === 'remnant') return { norm: 1, lessRadiated: true };
  const norm = settings.normaliseBy === 'M' ? 1 : settings.normaliseBy === 'adm' ? admEnergy : remnantMass;
  if (norm !== undefined && norm > 0) return { norm, lessRadiated: false };
  const field = settings.normaliseBy === 'adm' ? 'admEnergy' : 'remnantMass';
  return stop('engine/normaliser-missing', waveform.name, `The claim refers the ${recipe.noun} to ${settings.normaliseBy}, but ${waveform.name} states no binary.${field}.`, `State binary.${field} beside the waveform, or refer the ${recipe.noun} to M.`);
}

function startFinding(settings: RadiationSettings, record: RadiationRecord, name: string): Finding | null {
  const [first, last] = [record.axis[0]!, record.axis[record.axis.length - 1]!];
  // A printed start may be a rounding below the first sample.
  if (settings.startM >= first - 1e-9 * (last - first) && settings.startM < last) return null;
  return stop('engine/no-signal', name, `The integral starts at t = ${settings.startM} M, but ${name} runs from ${first} to ${last} M.`, 'Give a startM inside the record, on its own time axis.');
}

/** None of the modes in use has a sample that is not zero. */
const isSilent = (record: RadiationRecord): boolean => record.modes.every(({ re, im }) => re.every((x) => x === 0) && im.every((x) => x === 0));

const silence = (name: string): Finding => stop('engine/no-signal', name, `None of the modes in use of ${name} holds a signal.`, 'List modes that the file holds, or raise lMax.');

const noFloor = (name: string): Finding =>
  stop('engine/no-signal', name, `The phase of the dominant mode of ${name} does not move, so there is no frequency from which to integrate.`, 'Declare integrationFloor.');

/**
 * Restricts the completed waveform to a point's modes and fills in its settings.
 * Shape:  gives a function of the swept setting's value.
 * Units:  as RadiationSettings.
 * Error:  none.
 * Fails:  with the finding that stops the claim.
 * Source: settings.md sections 1, 2 and 5.
 */
export function preparerOf(completed: Waveform, claim: MeasureRequest, recipe: RadiationRecipe): (at: At) => PreparedPoint | Finding {
  const records = new Map<string, RadiationRecord | Finding>();
  const { name } = completed;
  const whole = radiationRecord(completed);
  const recordOf = (declared: DeclaredSettings): RadiationRecord | Finding => {
    const key = String(declared.lMax);
    const known = records.get(key);
    if (known) return known;
    const chosen = selectModes(completed, { modes: declared.modes ?? houseValues.modes, lMax: declared.lMax ?? null, withZeroM: true }).waveform;
    const found = radiationRecord(chosen);
    const made = 'saw' in found ? stop('engine/no-signal', name, `${recipe.article} ${recipe.noun} cannot be computed from ${found.saw}.`, found.fix) : found;
    records.set(key, made);
    return made;
  };
  return (at) => {
    const declared: DeclaredSettings = { ...claim.settings, ...at };
    const record = recordOf(declared);
    if ('code' in record) return record;
    if ('saw' in whole || isSilent(record)) return silence(name);
    // The floor is read from the dominant mode of the file, whatever modes the claim then uses.
    const settings = radiationSettings(declared, completed, whole, recipe);
    if (divisionsTo(record.variable, recipe.withStrain) > 0 && settings.floor === null) return noFloor(name);
    const norm = normOf(settings, completed, recipe);
    if ('code' in norm) return norm;
    return startFinding(settings, record, name) ?? { at, declared, record, whole, settings, ...norm };
  };
}
