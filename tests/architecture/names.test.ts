import { readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { ROOT, filesIn } from './support/source-files';

const FORBIDDEN = /^(utils?|helpers?|common|misc|stuff)$/;
/** Names that the framework prescribes, and folders such as `[id]`, `(desk)` and `_ui`. */
const KEBAB = /^[a-z0-9]+(-[a-z0-9]+)*$/;
const FRAMEWORK = /^(\[{1,2}(\.{3})?[a-zA-Z]+\]{1,2}|\([a-z-]+\)|_[a-z]+)$/;

const FILES = ['lib', 'db', 'app', 'tests'].flatMap((folder) => filesIn(folder, ['.ts', '.tsx', '.mjs']));

describe('names say what a file is for', () => {
  it('no file or folder has a name that explains nothing', () => {
    expect(
      FILES.filter(({ path: file }) => file.split('/').some((part) => FORBIDDEN.test(part.split('.')[0] ?? ''))).map(
        ({ path: file }) => file,
      ),
    ).toEqual([]);
  });

  it('files and folders are written in kebab-case', () => {
    const odd = FILES.filter(
      ({ path: file }) =>
        !file.split('/').every(
          (part) =>
            FRAMEWORK.test(part) ||
            part
              .split('.')
              .slice(0, -1)
              .concat(part.includes('.') ? [] : [part])
              .every((word) => KEBAB.test(word)),
        ),
    );
    expect(odd.map(({ path: file }) => file)).toEqual([]);
  });

  it('no file does nothing but pass on what others export, except where it says why', () => {
    const barrels = FILES.filter(({ path: file, text }) => !file.startsWith('tests/') && /export \*/.test(text));
    expect(barrels.map(({ path: file }) => file)).toEqual([]);
  });
});

describe('what the commands of package.json name exists', () => {
  it('every script file is there', () => {
    const { scripts } = JSON.parse(readFileSync(path.join(ROOT, 'package.json'), 'utf8')) as { scripts: Record<string, string> };
    const named = Object.values(scripts).flatMap((command) => command.match(/lib\/\S+\.(ts|mjs)/g) ?? []);
    expect(named.length).toBeGreaterThan(5);
    const have = new Set(FILES.map(({ path: file }) => file));
    expect(named.filter((file) => !have.has(file))).toEqual([]);
  });
});
