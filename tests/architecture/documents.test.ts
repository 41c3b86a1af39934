import { existsSync, readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { TABLE } from './support/import-table';
import { ROOT } from './support/source-files';

const read = (file: string): string => readFileSync(path.join(ROOT, file), 'utf8');
const scripts = Object.keys((JSON.parse(read('package.json')) as { scripts: object }).scripts);

/** `lib/engine` in a code span, or the target of a relative link. */
function pathsNamedIn(text: string): string[] {
  const spans = [...text.matchAll(/`((?:app|lib|db|content|tests|drizzle|\.ci)\/[\w./()[\]-]*)`/g)].map(([, name]) => name ?? '');
  const links = [...text.matchAll(/\]\((?!https?:|#|mailto:)([^)#]+)/g)].map(([, name]) => name ?? '');
  return [...spans, ...links];
}

describe.each(['README.md', 'DEVELOPERS.md'])('%s tells the truth', (document) => {
  it('every path it names exists', () => {
    const named = pathsNamedIn(read(document));
    expect(named.length).toBeGreaterThan(0);
    expect(named.filter((name) => !existsSync(path.join(ROOT, name)))).toEqual([]);
  });

  it('every command it names exists', () => {
    const named = [...read(document).matchAll(/npm run ([a-z:]+)/g)].map(([, name]) => name ?? '');
    expect(named.filter((name) => !scripts.includes(name))).toEqual([]);
  });
});

describe('the map for newcomers', () => {
  it('names every room of the import table', () => {
    const text = read('DEVELOPERS.md');
    const folders: Record<string, string> = { ui: 'app/_ui', app: 'app', db: 'db', env: 'lib/env.ts' };
    expect(Object.keys(TABLE).filter((room) => !text.includes(`\`${folders[room] ?? `lib/${room}`}\``))).toEqual([]);
  });
});

describe('decisions', () => {
  it('each has a number of its own and says question, options, choice, price and how it is checked', () => {
    const files = readdirSync(path.join(ROOT, 'content/decisions')).filter((name) => name.endsWith('.md'));
    expect(files.length).toBeGreaterThan(0);
    expect(files.filter((name) => !/^\d{4}-[a-z0-9-]+\.md$/.test(name))).toEqual([]);
    expect(new Set(files.map((name) => name.slice(0, 4))).size).toBe(files.length);
    const incomplete = files.filter(
      (name) =>
        !/\*\*Question[\s\S]*\*\*Options[\s\S]*\*\*Choice[\s\S]*\*\*Price[\s\S]*\*\*(How it is c|C)heck/.test(
          read(`content/decisions/${name}`),
        ),
    );
    expect(incomplete).toEqual([]);
  });
});
