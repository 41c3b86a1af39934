import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { ACCOUNT_ACTIONS, SUBMISSION_ACTIONS } from '@/lib/policy/actions';
import { DOORS } from '@/lib/policy/doors';
import { PAGE_DOORS } from '@/lib/policy/page-doors';
import { REVIEW_DOORS } from '@/lib/policy/review-doors';

const ALL: Readonly<Record<string, readonly string[]>> = { ...DOORS, ...REVIEW_DOORS, ...PAGE_DOORS };
const METHODS = /export (?:const|async function|function) (GET|POST|PUT|PATCH|DELETE|HEAD|OPTIONS)\b/g;

/** `app/(desk)/compose/[id]/page.tsx` → `/compose/{id}`. */
const addressOf = (file: string): string => {
  const parts = path.dirname(file).split('/').slice(1).filter((part) => !/^\(.*\)$/.test(part));
  return `/${parts.map((p) => p.replace(/^\[\.\.\.\w+\]$/, '*').replace(/^\[(\w+)\]$/, '{$1}')).join('/')}`;
};
const read = (file: string): string => readFileSync(file, 'utf8');
const files = (folder: string, ending: string): string[] =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter((f) => f.endsWith(ending)).map((f) => path.join(folder, f)).sort();
const sources = (folder: string): string[] => [...files(folder, '.ts'), ...files(folder, '.tsx')];

const pages = files('app', '/page.tsx').map((file) => `page ${addressOf(file)}`);
const routes = files('app', '/route.ts').flatMap((file) => [...read(file).matchAll(METHODS)].map(([, method]) => `${method} ${addressOf(file)}`));
const actions = sources('app')
  .filter((file) => /^\s*['"]use server['"]/m.test(read(file)))
  .flatMap((file) => [...read(file).matchAll(/door: '(action [^']+)'/g)].map(([, door]) => door ?? ''));

describe('every way in', () => {
  it.each([...pages, ...routes, ...actions])('%s is in the table of doors', (door) => {
    expect(ALL[door], `add "${door}" to lib/policy/doors.ts, review-doors.ts or page-doors.ts with what it asks of policy`).toBeDefined();
  });

  it('the table names no door that is not there', () => {
    expect(Object.keys(ALL).filter((door) => ![...pages, ...routes, ...actions].includes(door))).toEqual([]);
  });

  it('asks only what policy knows', () => {
    const known = [...Object.keys(SUBMISSION_ACTIONS), ...Object.keys(ACCOUNT_ACTIONS), 'own-session', 'anyone'];
    for (const [door, asks] of Object.entries(ALL)) for (const action of asks) expect(known, door).toContain(action);
  });

  it('is made by one of the two wrappers, but for what needs no policy', () => {
    const bare = files('app', '/route.ts').filter((file) => !read(file).includes('defineRoute('));
    for (const file of bare) {
      const methods = [...read(file).matchAll(METHODS)].map(([, method]) => `${method} ${addressOf(file)}`);
      for (const door of methods) expect(ALL[door]?.every((p) => p === 'anyone' || p === 'own-session' || p === 'register.read'), `${door} is not made by defineRoute`).toBe(true);
      if (!file.includes('/auth/')) expect(methods.every((m) => m.startsWith('GET ')), `${file} takes a write outside defineRoute`).toBe(true);
    }
  });

  it('carries its own id', () => {
    for (const file of files('app', '/route.ts')) {
      const used = [...read(file).matchAll(/door: '([^']+)'/g)].map(([, door]) => door);
      for (const door of used) expect(door?.endsWith(` ${addressOf(file)}`), `${file} calls itself ${door}`).toBe(true);
    }
  });

  it('exports from a file of actions nothing but actions, and no action is written inline', () => {
    for (const file of sources('app')) {
      const text = read(file);
      if (!/['"]use server['"]/.test(text)) continue;
      expect(text.trimStart(), `${file}: "use server" stands at the head of a file`).toMatch(/^['"]use server['"]/);
      for (const [line] of text.matchAll(/^export .*$/gm)) expect(line, file).toMatch(/^export const \w+ = defineAction\(/);
    }
  });
});

describe('grants', () => {
  it('are minted in lib/policy and nowhere else', () => {
    for (const file of ['lib', 'db', 'app'].flatMap(sources).filter((f) => !f.startsWith('lib/policy/'))) expect(read(file), file).not.toMatch(/\bas\s+(unknown\s+as\s+)?(Submission)?Grant\b|MintedGrant/);
  });

  it('are asked for by every write, or the write says why it needs none', () => {
    for (const file of files('db/writes', '.ts')) expect(read(file), `${file} takes no Grant and does not say why`).toMatch(/\bgrant: |_grant: |takes? no Grant/i);
  });
});
