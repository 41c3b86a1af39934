import { z } from 'zod';
import type { FirstVariationChanges, VariationChanges } from '@/db/schema/variations';
import { settingSchema } from '@/lib/claims/setting-schema';
import { settingsTable } from '@/lib/engine/quantities/settings-table';

/** One setting as a sheet takes it, or null: a declared one is taken away and the house default holds. */
const settings = z.strictObject(
  Object.fromEntries([...settingsTable.values()].map((row) => [row.name, settingSchema(row).nullable().describe(`${row.meaning} null takes a declared one away.`).optional()])),
);

const noise = z.union([z.strictObject({ curve: z.string().min(1).max(16) }), z.strictObject({ named: z.string().min(1).max(64) })]);

/** What may be changed. Whether the claim's quantity knows a setting is judged with its sheet, in the words of the sheet. */
export const changesInput = z
  .strictObject({
    settings: settings.optional().describe('Any settings of the claim’s quantity, as in a sheet. The swept one takes the place of its sweep.'),
    noise: noise.optional().describe('A built-in curve, or a noise entry of the sheet by its name.'),
  })
  .refine((changes) => Object.keys(changes.settings ?? {}).length > 0 || changes.noise !== undefined, 'at least one changed setting, or another noise curve');

const isFirst = (stored: VariationChanges | FirstVariationChanges): stored is FirstVariationChanges => !('settings' in stored);

/** A stored row, whichever version wrote it. */
export function changesOf(stored: VariationChanges | FirstVariationChanges): VariationChanges {
  if (!isFirst(stored)) return stored;
  const { noise: curve, ...own } = stored;
  return { ...(Object.keys(own).length > 0 && { settings: own }), ...(curve && { noise: curve }) };
}

const words: Readonly<Record<string, string>> = { fLowHz: 'lower cut-off', fHighHz: 'upper cut-off', totalMassMsun: 'total mass' };

function settingInWords([name, value]: readonly [string, unknown]): string {
  const said = words[name] ?? name;
  if (value === null) return `${said} not declared`;
  const unit = settingsTable.get(name as never)?.unit ?? '';
  const text = typeof value === 'object' ? JSON.stringify(value) : String(value);
  return typeof value === 'number' && unit !== '' ? `${said} ${text} ${unit}` : `${said} ${text}`;
}

/** Only what is changed, each as a few words. */
export function changesAsWords({ settings: changed, noise: curve }: VariationChanges): string[] {
  const noiseWords = curve === undefined ? [] : ['curve' in curve ? `built-in noise curve ${curve.curve}` : `noise curve ${curve.named}`];
  return [...Object.entries(changed ?? {}).map(settingInWords), ...noiseWords];
}
