import type { SettingReadings } from '@/app/_ui/claim/convention-words';
import type { Follows, Role } from '@/lib/engine/contract/quantity';
import type { SettingName } from '@/lib/engine/contract/settings';
import type { SettingRow } from '@/lib/engine/quantities/settings-table';

/** What the form needs to know of a quantity: plain data, drawn from the one table on the server. */
export interface QuantityRow {
  readonly id: string;
  readonly title: string;
  readonly unit: string;
  readonly roles: readonly Role[];
  readonly needsNoise: boolean;
  readonly settings: readonly SettingRow[];
  /** What else can be meant by them. */
  readonly readings: readonly SettingReadings[];
  readonly sweepable: readonly SettingName[];
  readonly scale: 'absolute' | 'ln';
  readonly follows?: Follows;
}

type Written = Readonly<Record<string, string | undefined>>;

const wordOf = ({ follows }: QuantityRow, settings: Written) => (follows === undefined ? undefined : follows.words[settings[follows.setting] || follows.houseDefault]);

/** The unit of a claim as it stands in the form. */
export const unitWith = (row: QuantityRow, settings: Written): string => wordOf(row, settings)?.unit ?? row.unit;

/** The settings that mean something in such a claim. */
export function settingsWith(row: QuantityRow, settings: Written): readonly SettingRow[] {
  const meant = wordOf(row, settings)?.settings;
  return meant === undefined ? row.settings : row.settings.filter(({ name }) => meant.includes(name));
}
