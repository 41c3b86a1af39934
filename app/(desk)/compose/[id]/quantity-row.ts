import type { Role } from '@/lib/engine/contract/quantity';
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
  readonly sweepable: readonly SettingName[];
  readonly scale: 'absolute' | 'ln';
}
