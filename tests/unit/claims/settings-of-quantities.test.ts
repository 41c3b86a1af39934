import { describe, expect, it } from 'vitest';
import { settingSchema } from '@/lib/claims/setting-schema';
import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import { settingsTable } from '@/lib/engine/quantities/settings-table';
import { catalogue } from '@/lib/pipeline/catalogue';

const quantities = [...catalogue.quantities.values()];

describe('every quantity that can be claimed', () => {
  it.each(quantities.map((quantity) => [quantity.id, quantity] as const))('%s takes only settings that the table describes', (id, quantity) => {
    expect(catalogue.quantities.get(id)).toBe(quantity);
    expect(quantity.settings.filter((name) => !settingsTable.has(name))).toEqual([]);
    expect(quantity.sweepable.filter((name) => !settingsTable.has(name))).toEqual([]);
    expect(new Set(quantity.settings).size).toBe(quantity.settings.length);
  });

  it.each(quantities.map((quantity) => [quantity.id, quantity] as const))('%s sweeps only over settings that are numbers, have numbers and words, or are places with a number to sweep', (_, quantity) => {
    for (const name of quantity.sweepable) {
      const row = settingsTable.get(name);
      expect(row && (['number', 'integer', 'taper'].includes(row.shape.kind) || (row.shape.kind === 'place' && row.shape.swept !== undefined)), name).toBe(true);
    }
  });

  it.each(quantities.map((quantity) => [quantity.id, quantity] as const))('%s has a natural tolerance above zero', (_, quantity) => {
    for (const value of [1e-4, 0.5, 0.98, 30]) expect(quantity.naturalTolerance(value)).toBeGreaterThan(0);
  });
});

describe('the settings table', () => {
  it('gives every setting a meaning, a house default in words and a schema', () => {
    for (const row of settingsTable.values()) {
      expect([row.meaning.length > 10, row.houseDefault.length > 0], row.name).toEqual([true, true]);
      expect(settingSchema(row).safeParse(undefined).success, row.name).toBe(false);
    }
  });

  it('names only curves that exist', () => {
    expect(catalogue.curves.filter((id) => builtInCurve(id) === undefined)).toEqual([]);
  });
});
