import { describe, expect, it } from 'vitest';
import { dark, light, tokenNames, type Palette, type TokenName } from '@/app/_ui/tokens';
import { countVerdicts, overallWord, verdictLooks } from '@/app/_ui/verdict/verdict-words';
import { drawGap } from '@/app/_ui/verdict/gap-gauge';
import { coverageText } from '@/app/_ui/verdict/coverage-cell';
import { budgetGroup } from '@/app/_ui/claim/budget-shares';
import { formatAt, formatSetting, settingLabel } from '@/app/_ui/claim/setting-names';
import { must } from './fixtures/result';
import { decimalsThatPart } from '@/app/_ui/claim/route-table';

/** Relative luminance and contrast of WCAG 2.2 (required: published; w3.org/TR/WCAG22, definition of contrast ratio). */
function luminance(hex: string): number {
  const linear = (i: number) => {
    const c = Number.parseInt(hex.slice(i, i + 2), 16) / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  };
  return 0.2126 * linear(1) + 0.7152 * linear(3) + 0.0722 * linear(5);
}
const contrast = (a: string, b: string) => {
  const [one, other] = [luminance(a), luminance(b)];
  return (Math.max(one, other) + 0.05) / (Math.min(one, other) + 0.05);
};

describe.each([['light', light], ['dark', dark]] as const)('the %s theme', (_name, theme: Palette) => {
  const text: readonly (readonly [TokenName, readonly TokenName[]])[] = [
    ['ink', ['page', 'sheet', 'claimed-side', 'hover']],
    ['ink-2', ['page', 'sheet', 'claimed-side', 'hover']],
    ['link', ['page', 'sheet', 'claimed-side', 'hover']],
    ['on-link', ['link']],
    ['agrees', ['sheet', 'page', 'agrees-tint']],
    ['unsettled', ['sheet', 'page', 'unsettled-tint']],
    ['differs', ['sheet', 'page', 'claimed-side', 'differs-tint']],
    ['notcomp', ['sheet', 'page']],
    ['waiting', ['sheet', 'page']],
  ];
  it.each(text.flatMap(([fore, backs]) => backs.map((back) => [fore, back] as const)))('%s can be read on %s (4.5 : 1)', (fore, back) => {
    expect(contrast(theme[fore], theme[back])).toBeGreaterThanOrEqual(4.5);
  });
  it.each((['control', 'focus', 'trace-claimed', 'trace-recomputed'] as const).map((fore) => [fore] as const))('%s stands out from page and sheet (3 : 1)', (fore) => {
    for (const back of ['page', 'sheet'] as const) expect(contrast(theme[fore], theme[back])).toBeGreaterThanOrEqual(3);
  });
});

it('both themes name the same tokens', () => {
  expect(Object.keys(dark).sort()).toEqual([...tokenNames].sort());
});

describe('verdicts in words', () => {
  it('are counted in full sentences', () => {
    expect(countVerdicts(['agrees', 'agrees', 'differs', 'unsettled'])).toBe('2 agree, 1 differs and 1 is unsettled');
    expect(countVerdicts([])).toBe('none yet');
  });
  it('never let one agreeing claim speak for all', () => {
    expect(overallWord(['agrees', 'agrees'])).toBe('All claims agree');
    expect(overallWord(['agrees', 'differs'])).toBe('Some claims agree');
    expect(overallWord(['differs', 'unsettled'])).toBe('No claim agrees');
    expect(overallWord(['unsettled'])).toBe('Unsettled');
    expect(overallWord(['agrees', 'waiting'])).toBe('A run is under way');
  });
  it('say differs and never failed or wrong', () => {
    for (const look of Object.values(verdictLooks)) expect(`${look.word} ${look.meaning}`).not.toMatch(/fail|wrong|error|invalid/i);
  });
});

describe('the gap gauge', () => {
  it('places the value within the band of T and clamps beyond three T with an arrow', () => {
    const inside = must(drawGap(0.5, 1, 0.1));
    expect(inside.at).toBeGreaterThan(inside.centre);
    expect(inside.at).toBeLessThan(inside.centre + inside.bandHalf);
    expect(drawGap(-40, 1, 0.1)).toMatchObject({ beyond: -1 });
    expect(drawGap(40, 1, 0.1)).toMatchObject({ beyond: 1 });
  });
  it('draws nothing where there is no tolerance or no number', () => {
    expect(drawGap(null, 1, 0)).toBeNull();
    expect(drawGap(1, null, 0)).toBeNull();
    expect(drawGap(Number.NaN, 1, 0)).toBeNull();
  });
});

describe('coverage and budget', () => {
  it('names what is missing and how many times too small an uncertainty is', () => {
    expect(coverageText({ state: 'unknown', missing: ['resolution'] })).toEqual({ word: 'Unknown', because: 'missing: resolution' });
    expect(coverageText({ state: 'unknown', missing: ['a', 'b'] }).because).toBe('2 components are missing');
    expect(coverageText({ state: 'unknown', missing: ['a', 'b'] }, true).because).toBe('missing: a, b');
    expect(coverageText({ state: 'understated', factor: 4.12 }).word).toBe('Understated × 4.1');
    expect(coverageText({ state: 'understated', factor: 2.98, missing: ['radius'] })).toEqual({ word: 'Understated × 3.0 or more', because: 'missing: radius' });
  });
  it('shares the variance within a group, and leaves the unknown out of it', () => {
    const line = (id: string, u: number | null) => ({ component: id, id, group: 'computation' as const, u, note: '' });
    const group = budgetGroup([line('a', 3), line('b', 4), line('c', null)], 'computation');
    expect(group.lines.map((l) => l.share)).toEqual([9 / 25, 16 / 25, null]);
    expect(group.expanded).toBe(10);
    expect(group.missing).toEqual(['c']);
  });
  it('says nothing rather than zero when no line of a group is known', () => {
    expect(budgetGroup([], 'coverage').expanded).toBeNull();
  });
});

describe('settings in words', () => {
  it('carry their unit and read lists, modes and yes or no', () => {
    expect(formatSetting('fLowHz', 20)).toBe('20 Hz');
    expect(formatSetting('modes', [[2, 2], [2, -2]])).toBe('(2,2) (2,−2)');
    expect(formatSetting('maximise', [])).toBe('nothing');
    expect(formatSetting('includeEnergyBeforeStart', false)).toBe('no');
    expect(formatSetting('cosmology', { h0: 67.4, omegaM: 0.315 })).toBe('h0 67.4, omegaM 0.315');
    expect(formatAt({ totalMassMsun: 60 })).toBe('60 M⊙');
    expect(settingLabel('somethingNew')).toBe('Something new');
  });
});

it('two routes are printed to the digit where they part', () => {
  expect(decimalsThatPart(0.91854503, 0.91854505)).toBe(9);
  expect(decimalsThatPart(0.5, 0.5)).toBeGreaterThan(10);
});
