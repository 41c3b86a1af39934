import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { withValues } from '@/app/(public)/methods/house-conventions/convention-values';
import { parseGlossary } from '@/app/(public)/methods/glossary/parse-glossary';
import { parseMethodPage, SETTINGS_HEADING } from '@/app/(public)/methods/parse-method-page';
import { shapeWords } from '@/app/(public)/methods/setting-shape-words';
import { RECORD_STANDINGS } from '@/lib/badges/standing';
import { houseRecoilMass, houseValues } from '@/lib/engine/contract/house-values';
import type { SettingName } from '@/lib/engine/contract/settings';
import { quantities } from '@/lib/engine/quantities/registry';
import { settingsTable } from '@/lib/engine/quantities/settings-table';
import { filesIn } from '../../architecture/support/source-files';

const read = (file: string): string => readFileSync(file, 'utf8');
const pages = readdirSync('content/methods').map((name) => parseMethodPage(name.replace(/\.md$/, ''), read(`content/methods/${name}`)));
const row = (name: SettingName) => settingsTable.get(name) ?? expect.fail(`${name} is in no row`);

describe('the methods pages', () => {
  it('describe every quantity that can be claimed, and nothing else', () => {
    expect(pages.map((page) => page.id).sort()).toEqual([...quantities.keys()].sort());
  });

  it.each(pages)('$id has equation, both routes, settings, uncertainty, stops, limits and sources', (page) => {
    const headings = page.sections.map((section) => section.heading);
    expect(headings).toEqual(expect.arrayContaining(['Formula', 'Two routes', SETTINGS_HEADING, 'Uncertainty', 'Limits', 'Sources']));
    expect(headings.some((heading) => heading.startsWith('What stops'))).toBe(true);
    const routes = page.sections.find((section) => section.heading === 'Two routes')?.body ?? '';
    expect(routes).toContain('**Route A**');
    expect(routes).toContain('**Route B**');
    expect(new Set(page.sections.map((section) => section.id)).size).toBe(page.sections.length);
  });

  it.each(pages)('$id says of settings only what they change, and of none that a sheet may not name', (page) => {
    const allowed = quantities.get(page.id)?.settings ?? [];
    expect([...page.notes.keys()].filter((name) => !(allowed as readonly string[]).includes(name))).toEqual([]);
    expect(page.notes.size).toBeGreaterThan(0);
    const body = page.sections.find((section) => section.heading === SETTINGS_HEADING)?.body ?? '';
    const lines = body.split('\n').filter((line) => line.trim() !== '');
    expect(lines.filter((line) => !/^- `[\w, ]+`: .+$/.test(line))).toEqual([]);
  });
});

describe('a house default', () => {
  it('is printed as the engine has it', () => {
    expect(row('threshold').houseDefault).toContain(String(houseValues.threshold));
    expect(row('templateMassRange').houseDefault).toBe(`[${houseValues.templateMassRange.join(', ')}]`);
    expect(row('maximise').houseDefault).toBe(houseValues.maximise.join(', '));
    expect(row('cosmology').houseDefault).toBe(`h0 ${houseValues.cosmology.h0} km/s/Mpc, omegaM ${houseValues.cosmology.omegaM}, flat`);
    expect(row('normaliseBy').houseDefault).toBe(`${houseValues.normaliseBy}; ${houseRecoilMass} for recoil`);
    for (const name of ['response', 'average', 'modes', 'rateLaw', 'detectors', 'armAngleDeg', 'parameters', 'includeEnergyBeforeStart'] as const) expect(row(name).houseDefault, name).toBe(String(houseValues[name]));
  });

  it('has no second spelling in the engine', () => {
    const spelt = filesIn('lib/engine', ['.ts']).flatMap(({ path, text }) => [...text.matchAll(/declared\??\.\w+ \?\? (?:['\d[]|true|false).*/g)].map(([line]) => `${path}: ${line}`));
    expect(spelt).toEqual([]);
  });
});

describe('type and range in words', () => {
  it('are those by which a sheet is checked', () => {
    expect(shapeWords(row('totalMassMsun'))).toBe('number from 0.1 to 1 × 10¹⁰, in M⊙');
    expect(shapeWords(row('fLowHz'))).toBe('number above 0, in Hz');
    expect(shapeWords(row('inclinationRad'))).toBe('number from 0 to π, in rad');
    expect(shapeWords(row('azimuthRad'))).toBe('number from −2π to 2π, in rad');
    expect(shapeWords(row('lMax'))).toBe('whole number from 2 to 12');
    expect(shapeWords(row('maximise'))).toBe('any of time, phase, polarisation, inclination, templateMass');
    for (const { shape, unit } of settingsTable.values()) expect(shapeWords({ shape, unit })).not.toContain('undefined');
  });
});

describe('the conventions', () => {
  const page = parseMethodPage('conventions', withValues(read('content/conventions.md')));

  it('take every number from the engine, and stand nowhere without one', () => {
    const text = page.sections.map((section) => section.body).join('\n');
    expect(text).not.toMatch(/\{\{|\}\}\$|NaN|undefined/);
    expect(text).toContain('4.925490947641\\times10^{-6}');
    expect(text).toContain('0.630783');
    expect(() => withValues('{{speedOfSound}}')).toThrow('speedOfSound');
  });

  it('each say where they come from', () => {
    expect(page.sections.length).toBeGreaterThanOrEqual(14);
    expect(page.sections.filter((section) => !/^Source: .+\.$/m.test(section.body)).map((section) => section.heading)).toEqual([]);
  });
});

describe('the glossary', () => {
  const glossary = parseGlossary(read('content/glossary.md'));
  const terms = glossary.parts.flatMap((part) => part.terms);
  const anchors = terms.flatMap((term) => [term.id, ...term.also]);

  it('has one anchor a word, and each once', () => {
    expect(anchors.filter((anchor, i) => anchors.indexOf(anchor) !== i)).toEqual([]);
    expect(anchors.every((anchor) => anchor !== '')).toBe(true);
  });

  it.each(['submission', 'claim', 'claimed-side', 'recomputed-side', 'run', 'route-a', 'route-b', 'finding', 'variation', 'candidate', 'thread', 'report', 'decision', 'record', 'badge', 'public-log', 'register', 'verdict', 'coverage', 'uncertainty-u', 'tolerance-t', 'lodge', 'enter'])('knows the word of the house %s', (word) => {
    expect(anchors).toContain(word);
  });

  it('knows every standing of a record, and every setting’s field term that a page leans on', () => {
    expect(RECORD_STANDINGS.filter((standing) => standing !== 'entered' && !anchors.includes(standing))).toEqual([]);
    for (const word of ['match', 'mismatch', 'overlap', 'taper', 'redshift-z', 'luminosity-distance-d-l', 'band', 'line-of-sight', 'polarisation', 'guard-band']) expect(anchors).toContain(word);
  });

  it('is linked by screens under anchors that it has', () => {
    const linked = filesIn('app', ['.tsx']).flatMap(({ text }) => [...text.matchAll(/\/methods\/glossary#([\w-]+)/g)].map(([, anchor]) => anchor ?? ''));
    expect(linked.length).toBeGreaterThan(0);
    expect(linked.filter((anchor) => !anchors.includes(anchor))).toEqual([]);
  });
});
