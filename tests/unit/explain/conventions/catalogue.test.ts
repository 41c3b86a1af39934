import { describe, expect, it } from 'vitest';
import type { SettingName } from '@/lib/engine/contract/settings';
import { quantities } from '@/lib/engine/quantities/registry';
import { settingsTable } from '@/lib/engine/quantities/settings-table';
import { besideSetting, unsaid } from '@/lib/explain/conventions/beside-setting';
import { conventionGroups, type ConventionId } from '@/lib/explain/conventions/convention';
import { conventionById, conventions, groupTitles } from '@/lib/explain/conventions/conventions';

/** Settings that nobody reads otherwise without saying so, each with the reason. */
const noReading: Partial<Record<SettingName, string>> = {
  parameters: 'the number of parameters is part of the criterion that is claimed',
  weight: 'the measure over spins is what the fraction is a fraction of',
  statistic: 'least, mean and weighted mean are three claims',
  observable: 'it says what is claimed',
  fit: 'it names a publication',
  plasmaDensityCm3: 'the plasma is a place, not a way of counting',
  radiativeEfficiency: 'a physical input of the estimate',
  accretionRateMsunPerYear: 'a physical input of the estimate',
  internalEnergyErg: 'a physical input of the estimate',
  radiusM: 'a physical input of the estimate',
};

const text = conventions.flatMap(({ title, effect, sentence, detect, options }) => [title, effect, sentence, detect ?? '', ...options.map(({ label }) => label)]);

describe('the catalogue of conventions', () => {
  it('holds C01 to C55, each once and in order', () => {
    expect(conventions.map(({ id }) => id)).toEqual(Array.from({ length: 55 }, (_, i) => `C${String(i + 1).padStart(2, '0')}`));
  });

  it('moves only quantities that can be claimed, and names each once', () => {
    for (const { id, affects } of conventions) {
      expect(affects.length, id).toBeGreaterThan(0);
      expect(new Set(affects).size, id).toBe(affects.length);
      expect(affects.filter((quantity) => !quantities.has(quantity)), id).toEqual([]);
    }
  });

  it('leaves no quantity without a convention', () => {
    expect([...quantities.keys()].filter((quantity) => !conventions.some(({ affects }) => affects.includes(quantity)))).toEqual([]);
  });

  it('names only settings of the sheet, and only such as one of the quantities it moves can take', () => {
    for (const { id, settings, affects } of conventions)
      for (const name of settings) {
        expect(settingsTable.has(name), `${id}: ${name}`).toBe(true);
        expect(affects.some((quantity) => quantities.get(quantity)?.settings.includes(name)), `${id}: ${name}`).toBe(true);
      }
  });

  it('has a convention for every setting of the sheet, or a reason why there is none', () => {
    const covered = new Set(conventions.flatMap(({ settings }) => settings));
    for (const name of settingsTable.keys()) expect(covered.has(name) !== (name in noReading), name).toBe(true);
  });

  it('offers at least two meanings of each, under ids of their own', () => {
    for (const { id, options } of conventions) {
      expect(options.length, id).toBeGreaterThan(1);
      expect(new Set(options.map((option) => option.id)).size, id).toBe(options.length);
      for (const option of options) expect(option.id, id).toMatch(/^[A-Za-z0-9]+(-[a-z0-9]+)*$/);
    }
  });

  it('has members in every group, and a heading for each', () => {
    for (const group of conventionGroups) {
      expect(conventions.some((convention) => convention.group === group), group).toBe(true);
      expect(groupTitles[group], group).not.toBe('');
    }
  });

  it('says each thing in one full sentence, and nothing in the notation of a formula', () => {
    for (const { id, sentence, effect } of conventions) {
      expect(sentence, id).toMatch(/^[A-ZΩ(].*\.$/);
      expect(effect, id).toMatch(/\.$/);
    }
    expect(text.filter((words) => /[\\$!]|\d-\d|(?<![A-Za-z])-\d/.test(words.replace('Hz^-1/2', '')))).toEqual([]);
  });
});

describe('the conventions beside a setting', () => {
  it('are those that the setting belongs to and that move the quantity', () => {
    const ids = (quantity: string, name: string): ConventionId[] => besideSetting(quantity, name).map(({ id }) => id);
    expect(ids('match', 'fLowHz')).toEqual(['C04']);
    expect(ids('snr', 'redshift')).toEqual(['C11', 'C14']);
    expect(ids('recoil', 'normaliseBy')).toEqual(['C46']);
    expect(ids('radiated-energy', 'normaliseBy')).toEqual(['C33']);
    expect(ids('recoil', 'negativeM')).toEqual(['C23', 'C24']);
    expect(ids('recoil', 'fLowHz')).toEqual([]);
  });

  it('are joined by those that no setting can say', () => {
    expect(unsaid('snr').map(({ id }) => id)).toEqual(['C01', 'C02', 'C03', 'C09', 'C19', 'C27', 'C35', 'C36', 'C39', 'C40', 'C55']);
    expect(unsaid('remnant-fit').map(({ id }) => id)).toEqual(['C55']);
  });

  it('refuses a number that is not in the catalogue', () => {
    expect(conventionById('C55').id).toBe('C55');
    expect(() => conventionById('C56')).toThrow('no convention C56');
  });
});
