import { describe, expect, it } from 'vitest';
import { claimSheetJsonSchema, resultJsonSchema } from '@/lib/claims/json-schemas';
import { smallCatalogue } from '../../support/small-catalogue';

interface Schema {
  readonly $schema?: string;
  readonly $id?: string;
  readonly required?: readonly string[];
  readonly additionalProperties?: unknown;
  readonly properties?: Record<string, Schema>;
  readonly items?: Schema;
  readonly anyOf?: readonly Schema[];
  readonly enum?: readonly unknown[];
  readonly minimum?: number;
  readonly description?: string;
}

describe('the open formats are published as JSON Schema 2020-12', () => {
  const sheet = claimSheetJsonSchema(smallCatalogue()) as Schema;
  const claim = sheet.properties?.['claims']?.items;

  it('which lets no unknown name through in a sheet', () => {
    expect(sheet.$schema).toBe('https://json-schema.org/draft/2020-12/schema');
    expect(sheet.$id).toBe('/schemas/counterfoil-claim/1');
    expect([sheet.additionalProperties, claim?.additionalProperties, claim?.properties?.['settings']?.additionalProperties]).toEqual([false, false, false]);
  });

  it('which names the quantities, and each setting with range, unit and default', () => {
    expect(claim?.properties?.['quantity']?.enum).toEqual(['match', 'overlap', 'snr', 'radiated-energy']);
    const mass = claim?.properties?.['settings']?.properties?.['totalMassMsun'];
    expect(mass?.minimum).toBeCloseTo(0.1, 8);
    expect(mass?.description).toContain('Unit: M☉.');
    expect(mass?.description).toContain('House default: required for waveforms in M');
  });

  it('which asks of a claim what every claim needs', () => {
    expect(claim?.required).toEqual(expect.arrayContaining(['id', 'quantity', 'of', 'claimed']));
    expect(sheet.required).toEqual(['format', 'claims']);
  });

  it('which lets fields be added to a result later', () => {
    const result = resultJsonSchema() as Schema;
    expect(result.additionalProperties).not.toBe(false);
    expect(result.required).toEqual(expect.arrayContaining(['format', 'engine', 'claims']));
  });
});
