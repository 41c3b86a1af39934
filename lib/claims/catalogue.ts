import type { Quantity } from '@/lib/engine/contract/quantity';
import type { SettingRow } from '@/lib/engine/quantities/settings-table';

/**
 * The claim room turns a sheet, which anyone may have written, into claims whose every word is
 * known and in range, or into the list of everything that has to be mended. It computes nothing.
 * What can be claimed is handed in, so that the room knows the language and not the workshop.
 */
export interface Catalogue {
  readonly quantities: ReadonlyMap<string, Quantity>;
  readonly settings: ReadonlyMap<string, SettingRow>;
  /** Ids of the built-in noise curves. */
  readonly curves: readonly string[];
}
