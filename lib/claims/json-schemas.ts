import { z } from 'zod';
import type { SettingRow } from '@/lib/engine/quantities/settings-table';
import { resultSchema } from './result-schema';
import { singleRoles } from './roles';
import { settingSchema, sweptSchema } from './setting-schema';
import { claimSchema, noiseSchema, sheetSchema, waveformSchema } from './sheet-schema';
import type { Catalogue } from './catalogue';

/**
 * The open formats as JSON Schema 2020-12, drawn from the schemas that judge them. What a schema
 * cannot say (roles by quantity, a sweep of one setting) the parser says in its sentences.
 */
type JsonSchema = Readonly<Record<string, unknown>>;

const printed = z.string().describe('Digits as printed, such as "0.9984" or "0.9984(3)"; half a unit of the last one is added to the tolerance.');
const plain = z.union([z.number(), printed]);
const claimedEntry = z.union([z.number(), printed, z.strictObject({ value: plain, uncertainty: plain.optional() }), z.strictObject({ above: plain }), z.strictObject({ below: plain })]);

export function claimSheetJsonSchema(catalogue: Catalogue): JsonSchema {
  const rows = [...catalogue.settings.values()];
  const settings = z.strictObject(Object.fromEntries(rows.map((row) => [row.name, described(row).optional()])));
  const sweeps = [...new Set([...catalogue.quantities.values()].flatMap((quantity) => quantity.sweepable))].sort();
  const swept = rows.filter((row) => sweeps.includes(row.name)).map((row) => z.strictObject({ [row.name]: z.array(described(row, sweptSchema(row))).min(1) }));
  const claim = claimSchema.extend({
    quantity: z.enum([...catalogue.quantities.keys()]),
    of: z.strictObject({
      ...Object.fromEntries([...singleRoles, 'series'].map((role) => [role, z.string().optional()])),
      signals: z.array(z.string()).min(1).optional(),
      templates: z.array(z.string()).min(1).optional(),
    }),
    settings: settings.optional(),
    over: swept.length > 0 ? z.union(swept).optional() : z.undefined(),
    claimed: z.union([claimedEntry, z.array(claimedEntry).min(1)]),
  });
  const sheet = sheetSchema.extend({
    waveforms: z.record(z.string(), waveformSchema).optional(),
    noise: z.record(z.string(), noiseSchema).optional(),
    claims: z.array(claim).min(1).max(1000),
  });
  return toJsonSchema(sheet, 'counterfoil-claim/1', 'A claim sheet of Counterfoil');
}

const described = (row: SettingRow, schema: z.ZodType = settingSchema(row)): z.ZodType => schema.describe(`${row.meaning}${row.unit === '' ? '' : ` Unit: ${row.unit}.`} House default: ${row.houseDefault}.`);

export const resultJsonSchema = (): JsonSchema => toJsonSchema(resultSchema, 'counterfoil-result/1', 'What one run of Counterfoil says about one claim sheet');

function toJsonSchema(schema: z.ZodType, id: string, title: string): JsonSchema {
  const { $schema, ...rest } = z.toJSONSchema(schema, { target: 'draft-2020-12', io: 'input' });
  return { $schema, $id: `/schemas/${id}`, title, ...rest };
}
