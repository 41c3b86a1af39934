import { z } from 'zod';
import type { FirstVariationChanges, VariationChanges } from '@/db/schema/variations';
import { settingSchema } from '@/lib/claims/setting-schema';
import { settingsTable } from '@/lib/engine/quantities/settings-table';

/** One setting as a sheet takes it, or null: a declared one is taken away and the house default holds. */
const settings = z.strictObject(
  Object.fromEntries([...settingsTable.values()].map((row) => [row.name, settingSchema(row).nullable().describe(`${row.meaning} null takes a declared one away.`).optional()])),
);

const noise = z.union([z.strictObject({ curve: z.string().min(1).max(16) }), z.strictObject({ named: z.string().min(1).max(64) })]);

/** Three readings at once are as many as anybody can tell apart. */
export const MOST_READINGS = 3;

const readings = z
  .array(z.string().regex(/^C\d\d:[^\s]{1,80}$/, 'a reading by its id, such as C02:quieter'))
  .min(1)
  .max(MOST_READINGS)
  .refine((ids) => new Set(ids.map((id) => id.slice(0, 3))).size === ids.length, 'one reading of each convention')
  .describe('Conventions read otherwise, by ids that GET /submissions/{id}/variations?claimId=… lists. Inputs are edited or the number is multiplied; no sheet can say it.');

const mask = z
  .strictObject({ from: z.number(), to: z.number() })
  .refine(({ from, to }) => to > from, 'an end after its beginning')
  .describe('A stretch of the files’ own time that is set to zero, its edges falling over a tenth of it each.');

/** What may be changed. Whether the claim's quantity knows a setting is judged with its sheet, in the words of the sheet. */
export const changesInput = z
  .strictObject({
    settings: settings.optional().describe('Any settings of the claim’s quantity, as in a sheet. The swept one takes the place of its sweep.'),
    noise: noise.optional().describe('A built-in curve, or a noise entry of the sheet by its name.'),
    readings: readings.optional(),
    mask: mask.optional(),
  })
  .refine((changes) => Object.keys(changes.settings ?? {}).length > 0 || (changes.readings ?? []).length > 0 || changes.noise !== undefined || changes.mask !== undefined, 'at least one changed setting, another noise curve, a convention read otherwise, or a mask');

/** As it is asked for; kept with the words that the base run has for each reading. */
export type AskedChanges = Omit<VariationChanges, 'readings'> & { readonly readings?: readonly string[] };

export const askedAgain = ({ readings: kept, ...changes }: VariationChanges): AskedChanges => ({ ...changes, ...(kept && { readings: kept.map(({ id }) => id) }) });

const isFirst = (stored: VariationChanges | FirstVariationChanges): stored is FirstVariationChanges => !('settings' in stored || 'readings' in stored || 'mask' in stored);

/** A stored row, whichever version wrote it. */
export function changesOf(stored: VariationChanges | FirstVariationChanges): VariationChanges {
  if (!isFirst(stored)) return stored;
  const { noise: curve, ...own } = stored;
  return { ...(Object.keys(own).length > 0 && { settings: own }), ...(curve && { noise: curve }) };
}

const signed = (x: number): string => String(x).replace('-', '−');

const words: Readonly<Record<string, string>> = { fLowHz: 'lower cut-off', fHighHz: 'upper cut-off', totalMassMsun: 'total mass' };

function settingInWords([name, value]: readonly [string, unknown]): string {
  const said = words[name] ?? name;
  if (value === null) return `${said} not declared`;
  const unit = settingsTable.get(name as never)?.unit ?? '';
  const text = typeof value === 'object' ? JSON.stringify(value) : String(value);
  return typeof value === 'number' && unit !== '' ? `${said} ${text} ${unit}` : `${said} ${text}`;
}

/** Only what is changed, each as a few words. */
export function changesAsWords({ settings: changed, noise: curve, readings: read = [], mask: cut }: VariationChanges): string[] {
  const noiseWords = curve === undefined ? [] : ['curve' in curve ? `built-in noise curve ${curve.curve}` : `noise curve ${curve.named}`];
  return [...Object.entries(changed ?? {}).map(settingInWords), ...noiseWords, ...read.map(({ clause }) => `as if ${clause}`), ...(cut ? [`without ${signed(cut.from)} to ${signed(cut.to)} of the files’ time`] : [])];
}
