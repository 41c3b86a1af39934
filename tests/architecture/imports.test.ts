import ts from 'typescript';
import { describe, expect, it } from 'vitest';
import { DOORS, KEPT, TABLE, type Rule } from './support/import-table';
import { filesIn, importsOf, roomOf, type Import, type SourceFile } from './support/source-files';

const FILES = ['lib', 'db', 'app'].flatMap((folder) => filesIn(folder));

/** A sentence when the import is not in the table. */
function complaint(file: SourceFile, { target, typeOnly, line }: Import): string | undefined {
  const room = roomOf(file.path);
  const rule = TABLE[room];
  const where = `${file.path}:${line}`;
  if (!rule) return `${where}: the table has no room "${room}"`;
  if (DOORS.some((door) => file.path.startsWith(door.from) && target.startsWith(door.to))) return undefined;
  if (target.startsWith('node:') || target.startsWith('pkg:')) return packageComplaint(where, room, rule, target);
  const other = roomOf(target);
  if (other === room || rule.values.includes(other)) return undefined;
  if (!rule.types?.includes(other)) return `${where}: ${room} may not import ${other} (${target})`;
  return typeOnly ? undefined : `${where}: ${room} may import only types of ${other} (${target})`;
}

function packageComplaint(where: string, room: string, rule: Rule, target: string): string | undefined {
  const kept = KEPT[target];
  if (kept) return kept.includes(room) ? undefined : `${where}: ${target} belongs to ${kept.join(', ')}`;
  const name = target.startsWith('node:') ? 'node' : target.slice(4);
  return rule.packages.includes('*') || rule.packages.includes(name) ? undefined : `${where}: ${room} may not import ${target}`;
}

describe('a claim walks through the house one way', () => {
  it('every import is in the table', () => {
    expect(FILES.flatMap((file) => importsOf(file).flatMap((one) => complaint(file, one) ?? []))).toEqual([]);
  });

  it.each([
    ['lib/engine/x.ts', `import { z } from 'zod'`],
    ['lib/engine/x.ts', `import { readFileSync } from 'node:fs'`],
    ['lib/engine/x.ts', `import { y } from '@/lib/verdicts/y'`],
    ['lib/kernel/x.ts', `export { y } from '../engine/y'`],
    ['lib/policy/x.ts', `import { reviewStates } from '@/lib/reviews/states'`],
    ['app/(desk)/page.tsx', `import { database } from '@/db/client'`],
    ['app/_ui/x.tsx', `const y = await import('@/lib/services/y')`],
    ['lib/services/x.ts', `import { Pool } from 'pg'`],
    ['db/reads/x.ts', `import { lodge } from '@/lib/services/lodge'`],
  ])('the table refuses in %s: %s', (path, text) => {
    expect(importsOf(parsed(path, text)).flatMap((one) => complaint(parsed(path, text), one) ?? [])).toHaveLength(1);
  });

  it('every door that stands open is used, so that the list cannot only grow', () => {
    const used = (door: (typeof DOORS)[number]): boolean =>
      FILES.some((file) => file.path.startsWith(door.from) && importsOf(file).some(({ target }) => target.startsWith(door.to)));
    expect(DOORS.filter((door) => !used(door))).toEqual([]);
  });
});

describe('set-up scripts run before node_modules exists', () => {
  it('they import only Node built-ins and each other', () => {
    const scripts = filesIn('lib/tools', ['.mjs']).filter(({ path }) => !path.endsWith('bench.mjs'));
    expect(scripts.length).toBeGreaterThan(5);
    const outside = scripts.flatMap((file) =>
      importsOf(file)
        .filter(({ target }) => !target.startsWith('node:') && !target.startsWith('lib/tools/'))
        .map(({ target, line }) => `${file.path}:${line}: ${target}`),
    );
    expect(outside).toEqual([]);
  });
});

function parsed(path: string, text: string): SourceFile {
  return { path, text, syntax: ts.createSourceFile(path, text, ts.ScriptTarget.Latest, true) };
}
