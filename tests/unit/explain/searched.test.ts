import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { conventions } from '@/lib/explain/conventions/conventions';
import { evidenceIn, measured } from '@/lib/explain/flips/evidence';

/** Entries that no rerun, edit of a file or factor can put into effect, each with why (decision 0119). */
const notSearched: Readonly<Record<string, string>> = {
  C07: 'how a modulus is found is the engine’s own rule', C21: 'a sign changes no norm', C26: 'the phases of harmonics stand in the file', C28: 'which time a label counts is not undone by the data',
  C29: 'another extraction is another file', C34: 'the stencil is the engine’s own', C38: 'the engine refines every peak', C39: 'the rule between points of a curve is the house’s own',
  C44: 'masses and spins at another time are other numbers', C51: 'a background is part of the file', C52: 'spacings are declared', C54: 'digits of constants move less than any tolerance',
};

const folder = path.join(process.cwd(), 'lib', 'explain', 'flips');
const sources = readdirSync(folder).map((name) => readFileSync(path.join(folder, name), 'utf8')).join('\n');
const searched = new Set([...sources.matchAll(/'(C\d\d)'/g)].map(([, id]) => id));

describe('the catalogue and the search', () => {
  it.each(conventions.map(({ id }) => id))('%s is read otherwise by the search, or there is a reason why not', (id) => {
    expect(searched.has(id), id).toBe(notSearched[id] === undefined);
  });
});

describe('words that came with a sheet', () => {
  const texts = [{ where: 'noise.txt', inFile: true, text: 'f (Hz)   ASD (Hz^-1/2), from 20 Hz on' }];

  it('speak for a reading, with the place and the words around them', () => {
    const found = evidenceIn(texts, { supports: [/\bASD\b/] });
    expect(found).toEqual({ evidence: 'supports', evidenceFrom: 'noise.txt: “f (Hz) ASD (Hz^-1/2), from 20 Hz on”', inFile: true });
    const statement = [{ where: 'the statement', inFile: false, text: 'The ASD of both' }];
    expect(evidenceIn(statement, { supports: [/\bASD\b/] }).inFile).toBe(false);
    expect(evidenceIn([...statement, ...texts], { supports: [/\bASD\b/] }).inFile).toBe(true);
  });

  it('settle nothing where they speak on both sides, or on none', () => {
    expect(evidenceIn(texts, { supports: [/ASD/], contradicts: [measured(20, 'Hz')] }).evidence).toBe('none');
    expect(evidenceIn(texts, { supports: [measured(30, 'Hz')] }).evidence).toBe('none');
  });

  it('name a number whole: 20 Hz is neither 120 Hz nor 20.5 Hz, and is 20.0 Hz', () => {
    const of20 = measured(20, 'Hz');
    expect(['from 20 Hz', '20Hz', '20.0 Hz'].every((text) => of20.test(text))).toBe(true);
    expect(['120 Hz', '20.5 Hz', '20 Hzz', '1.20 Hz'].some((text) => of20.test(text))).toBe(false);
  });
});
