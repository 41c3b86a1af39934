import { describe, expect, it } from 'vitest';
import { catalogueRows } from '@/app/(desk)/compose/[id]/catalogue-rows';
import { settingsWith, unitWith } from '@/app/(desk)/compose/[id]/quantity-row';

const row = (id: string) => catalogueRows().find((each) => each.id === id) ?? expect.fail(`${id} is in no row`);

describe('a claim whose observable is chosen in the form', () => {
  it.each([
    ['extrapolated-value', {}, ''],
    ['extrapolated-value', { observable: '' }, ''],
    ['extrapolated-value', { observable: 'recoil' }, 'km/s'],
    ['radius-extrapolation', { observable: 'phase-at-peak' }, 'rad'],
    ['convergence-order', { observable: 'recoil' }, ''],
    ['recoil', {}, 'km/s'],
  ])('of %s with %j is in "%s"', (id, settings, unit) => expect(unitWith(row(id), settings)).toBe(unit));

  it('offers the settings that go with it, and no others', () => {
    const names = (settings: Readonly<Record<string, string>>) => settingsWith(row('extrapolated-value'), settings).map(({ name }) => name);
    expect(names({ observable: 'phase-at-peak' })).toEqual(['observable', 'formalOrder', 'modes', 'startM', 'integrationFloor']);
    expect(names({})).toContain('includeEnergyBeforeStart');
    expect(names({})).not.toContain('window');
    expect(settingsWith(row('recoil'), {})).toEqual(row('recoil').settings);
  });
});
