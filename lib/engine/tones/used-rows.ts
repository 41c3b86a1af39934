import type { CompletedModes } from '../conditioning/complete-modes';
import type { UsedSetting } from '../contract/measurement';
import type { MeasureRequest } from '../contract/quantity';
import type { SettingName } from '../contract/settings';

/** Words of a waveform that have a house default. */
export type FileWord = 'negativeM' | 'tetrad';

const isFileWord = (name: SettingName | FileWord): name is FileWord => name === 'negativeM' || name === 'tetrad';

/** How a setting came to its value; rows of file words are made only where the file does not say. */
export const standingOf = (name: SettingName | FileWord, { settings: declared, over }: Pick<MeasureRequest, 'settings' | 'over'>): UsedSetting['standing'] =>
  isFileWord(name) ? 'assumed' : name === over?.setting ? 'swept' : declared[name] === undefined ? 'assumed' : 'declared';

export interface UsedRow {
  /** A setting of the claim, or a word of the waveform's that nobody gave. */
  readonly name: SettingName | FileWord;
  readonly value: unknown;
  readonly unit?: string;
  /** Could another choice of this setting change the value of this claim? */
  readonly matters: boolean;
}

/** Settings as a reader sees them, and the names of house defaults that could change the value (the mark ● of settings.md). */
export function usedSettings(rows: readonly UsedRow[], request: Pick<MeasureRequest, 'settings' | 'over'>): { readonly settings: UsedSetting[]; readonly assumed: string[] } {
  return {
    settings: rows.map(({ name, value, unit }): UsedSetting => ({ name, value, standing: standingOf(name, request), ...(unit === undefined ? {} : { unit }) })),
    assumed: rows.filter(({ name, matters }) => matters && standingOf(name, request) === 'assumed').map(({ name }) => name),
  };
}

/** The mirror rule where nobody declared it and a mode in use was made up by it (rule 2.3). */
export const mirrorRows = ({ mirrorAssumed }: Pick<CompletedModes, 'mirrorAssumed'>, used: readonly { readonly m: number }[]): UsedRow[] =>
  mirrorAssumed && used.some(({ m }) => m < 0) ? [{ name: 'negativeM', value: 'mirror', matters: true }] : [];

/** lMax where the claim says it: undeclared it leaves nothing out. */
export function highestRows(lMax: number | null): UsedRow[] {
  return lMax === null ? [] : [{ name: 'lMax', value: lMax, matters: false }];
}

/** ω₀ where something was integrated, and the start from which a floor that nobody declared is read. */
export function floorRows(floor: number | null, startM: number, { settings: declared, over }: Pick<MeasureRequest, 'settings' | 'over'>): UsedRow[] {
  if (floor === null) return [];
  const given = declared.integrationFloor !== undefined || over?.setting === 'integrationFloor';
  return [...(given ? [] : [{ name: 'startM', value: startM, unit: 'M', matters: true } as const]), { name: 'integrationFloor', value: floor, unit: 'rad/M', matters: true }];
}
