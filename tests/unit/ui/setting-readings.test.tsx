import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { catalogueRows } from '@/app/(desk)/compose/[id]/catalogue-rows';
import { SettingTable } from '@/app/_ui/claim/setting-table';
import { readingsOf, unsaidOf } from '@/app/views/setting-readings';
import type { UsedSetting } from '@/lib/engine/contract/measurement';
import { besideSetting } from '@/lib/explain/conventions/beside-setting';

const settings: readonly UsedSetting[] = [
  { name: 'fLowHz', value: 20, standing: 'declared' },
  { name: 'negativeM', value: 'mirror', standing: 'assumed' },
  { name: 'parameters', value: 1, standing: 'assumed' },
];
const names = settings.map(({ name }) => name);
const drawn = (quantity: string): string => renderToStaticMarkup(<SettingTable claimId="C1" settings={settings} readings={readingsOf(quantity, names)} unsaid={unsaidOf(quantity)} />);

describe('the settings of an opened claim', () => {
  it('lead from each setting to its conventions, and say sentence and effect', () => {
    const markup = drawn('match');
    expect(markup).toContain('href="/methods/conventions#C04"');
    expect(markup).toContain('C04<span class="sr-only">: what else can be meant by lower cut-off</span>');
    expect(besideSetting('match', 'fLowHz').filter(({ sentence }) => !markup.includes(sentence))).toEqual([]);
    expect(markup).toContain('0.847 from 10 Hz');
  });

  it('say nothing of a convention that does not move the quantity', () => {
    expect(drawn('match')).not.toContain('#C24');
    expect(drawn('recoil')).toContain('#C24');
    expect(drawn('recoil')).not.toContain('#C04');
  });

  it('list by title what no setting says', () => {
    expect(drawn('match')).toContain('Said by no setting');
    expect(drawn('match')).toContain('What the noise column holds');
  });

  it('stand without the column where nothing is known of the quantity', () => {
    expect(renderToStaticMarkup(<SettingTable claimId="C1" settings={settings} />)).not.toContain('Convention');
  });
});

describe('the settings of the composer', () => {
  it('carry for each quantity what else can be meant by its own settings', () => {
    for (const { id, settings: own, readings } of catalogueRows()) {
      expect(readings.map(({ setting }) => setting).filter((name) => !own.some((row) => row.name === name)), id).toEqual([]);
      for (const { setting, notes } of readings) expect(notes.map((note) => note.id), `${id}: ${setting}`).toEqual(besideSetting(id, setting).map((convention) => convention.id));
    }
  });

  it('say each convention once to the browser, as one object', () => {
    const all = catalogueRows().flatMap(({ readings }) => readings.flatMap(({ notes }) => notes));
    expect(new Set(all).size).toBe(new Set(all.map(({ id }) => id)).size);
  });
});
