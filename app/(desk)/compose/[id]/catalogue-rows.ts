import { readingsOf } from '@/app/views/setting-readings';
import { quantities } from '@/lib/engine/quantities/registry';
import { settingRows } from '@/lib/engine/quantities/settings-table';
import type { QuantityRow } from './quantity-row';

/** Drawn on the server: the quantities themselves bring the whole engine along, which no browser needs. */
export function catalogueRows(): readonly QuantityRow[] {
  return [...quantities.values()].map((q) => ({
    id: q.id,
    title: q.title,
    unit: q.unit,
    roles: q.roles,
    needsNoise: q.needsNoise,
    settings: settingRows(q),
    readings: readingsOf(q.id, q.settings),
    sweepable: q.sweepable,
    scale: q.scale,
    ...(q.follows ? { follows: q.follows } : {}),
  }));
}
