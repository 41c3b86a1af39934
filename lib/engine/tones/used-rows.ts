import type { UsedSetting } from '../contract/measurement';
import type { MeasureRequest } from '../contract/quantity';
import type { SettingName } from '../contract/settings';

export interface UsedRow {
  readonly name: SettingName;
  readonly value: unknown;
  readonly unit?: string;
  /** Could another choice of this setting change the value of this claim? */
  readonly matters: boolean;
}

/** Settings as a reader sees them, and the names of house defaults that could change the value (the mark ● of settings.md). */
export function usedSettings(rows: readonly UsedRow[], { settings: declared, over }: Pick<MeasureRequest, 'settings' | 'over'>): { readonly settings: UsedSetting[]; readonly assumed: string[] } {
  const standing = (name: SettingName): UsedSetting['standing'] => (name === over?.setting ? 'swept' : declared[name] === undefined ? 'assumed' : 'declared');
  return {
    settings: rows.map(({ name, value, unit }): UsedSetting => ({ name, value, standing: standing(name), ...(unit === undefined ? {} : { unit }) })),
    assumed: rows.filter(({ name, matters }) => matters && standing(name) === 'assumed').map(({ name }) => name),
  };
}

/** ω₀ where something was integrated, and the start from which a floor that nobody declared is read. */
export function floorRows(floor: number | null, startM: number, { settings: declared, over }: Pick<MeasureRequest, 'settings' | 'over'>): UsedRow[] {
  if (floor === null) return [];
  const given = declared.integrationFloor !== undefined || over?.setting === 'integrationFloor';
  return [...(given ? [] : [{ name: 'startM', value: startM, unit: 'M', matters: true } as const]), { name: 'integrationFloor', value: floor, unit: 'rad/M', matters: true }];
}
