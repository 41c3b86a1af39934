import type { SettingName } from '@/lib/engine/contract/settings';
import { quantities } from '@/lib/engine/quantities/registry';
import { settingsTable, type SettingRow } from '@/lib/engine/quantities/settings-table';
import type { QuantityRow } from './quantity-row';

/** Drawn on the server: the quantities themselves bring the whole engine along, which no browser needs. */
export function catalogueRows(): readonly QuantityRow[] {
  const rowOf = (name: SettingName): readonly SettingRow[] => {
    const row = settingsTable.get(name);
    return row ? [row] : [];
  };
  return [...quantities.values()].map((q) => ({
    id: q.id,
    title: q.title,
    unit: q.unit,
    roles: q.roles,
    needsNoise: q.needsNoise,
    settings: q.settings.flatMap(rowOf),
    sweepable: q.sweepable,
    scale: q.scale,
  }));
}
