import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { checks, identities, scenarios, type Held, type Place } from './outside-values';

const list = join('..', 'shared', 'reference', 'checks.json');
const isThere = existsSync(list);
const numbered = (letter: string): string[] => Array.from({ length: 16 }, (_, i) => `${letter}${i + 1}`);

const sources = new Map<string, string | null>();
/** The file without its comments: an id or a title there proves nothing. */
function sourceOf(file: string): string | null {
  const path = join('tests', `${file}.test.ts`);
  if (!sources.has(file)) sources.set(file, existsSync(path) ? readFileSync(path, 'utf8').replace(/^\s*\/\*[\s\S]*?\*\/|^\s*\/\/.*$/gm, '') : null);
  return sources.get(file)!;
}

/** What is wrong with a place: null when the test stands where the table says, under its id. */
function fault(id: string, [file, title]: Held): string | null {
  const source = sourceOf(file);
  if (source === null) return `${id}: there is no ${file}`;
  if (!source.includes(title)) return `${id}: ${file} has no test "${title}"`;
  return new RegExp(`(?<![\\w])${id}(?![\\w])`).test(source) ? null : `${id}: ${file} does not name it`;
}
const isHeld = (place: Place): place is Held => 'length' in place;
const faults = (table: ReadonlyMap<string, Place>): string[] =>
  [...table].flatMap(([id, place]) => (isHeld(place) ? [fault(id, place)] : [place.because.length > 40 ? null : `${id}: no reason`])).filter((text) => text !== null);

describe('outside values', () => {
  it.runIf(isThere)(isThere ? 'are all in the table, and nothing else is' : `are all in the table (skipped: ${list} is missing)`, () => {
    const { checks: given } = JSON.parse(readFileSync(list, 'utf8')) as { checks: readonly { readonly id: string }[] };
    expect([...checks.keys()].sort()).toEqual(given.map(({ id }) => id).sort());
  });
  it('stand in the tests that the table names, under their ids', () => expect(faults(checks)).toEqual([]));
  it('of appendix C: T1 to T16 likewise', () => {
    expect([...identities.keys()]).toEqual(numbered('T'));
    expect(faults(identities)).toEqual([]);
  });
  it('of section 7: D1 to D16 likewise', () => {
    expect([...scenarios.keys()].sort()).toEqual(numbered('D').sort());
    expect(faults(scenarios)).toEqual([]);
  });
  it('are missed when a file, a title or an id is not there', () => {
    expect(fault('F1', ['golden/nowhere', 'constants'])).toMatch(/there is no/);
    expect(fault('F1', ['golden/constants', 'no such title'])).toMatch(/has no test/);
    expect(fault('F99', ['golden/constants', 'constants'])).toMatch(/does not name it/);
  });
});
