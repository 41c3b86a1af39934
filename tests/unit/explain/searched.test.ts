import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { conventions } from '@/lib/explain/conventions/conventions';
import { notTried } from '@/lib/explain/conventions/not-tried';
import { evidenceIn, measured } from '@/lib/explain/flips/evidence';

const folder = path.join(process.cwd(), 'lib', 'explain', 'flips');
const sources = readdirSync(folder).map((name) => readFileSync(path.join(folder, name), 'utf8')).join('\n');
const searched = new Set([...sources.matchAll(/'(C\d\d)'/g)].map(([, id]) => id));

describe('the catalogue and the search', () => {
  it.each(conventions.map(({ id }) => id))('%s is read otherwise by the search, or there is a reason why not', (id) => {
    expect(searched.has(id), id).toBe(notTried[id] === undefined);
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
