import type { Catalogue } from '@/lib/claims/catalogue';
import { builtInCurves } from '@/lib/engine/noise/built-in-curves';
import { quantities } from '@/lib/engine/quantities/registry';
import { settingsTable } from '@/lib/engine/quantities/settings-table';

/** What can be claimed with this version of the engine. */
export const catalogue: Catalogue = { quantities, settings: settingsTable, curves: builtInCurves.map((curve) => curve.id) };
