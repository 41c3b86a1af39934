import type { Problem } from '@/lib/kernel/problem';
import { pathFault } from '@/lib/kernel/relative-path';
import { describe } from './pointer';

export { pathFault };

const expected = 'a relative path inside the sheet’s folder, such as "data/a.txt"';

export function pathProblem(path: string, where: string): Problem | null {
  const saw = pathFault(path);
  return saw === null ? null : { code: 'claims/path', where, saw, expected };
}

/** Names that some file systems cannot tell apart. */
export function caseClashes(paths: readonly { readonly path: string; readonly where: string }[]): Problem[] {
  const first = new Map<string, string>();
  const problems: Problem[] = [];
  for (const { path, where } of paths) {
    const key = path.normalize('NFC').toLowerCase();
    const seen = first.get(key);
    if (seen === undefined) first.set(key, path);
    else if (seen !== path) problems.push({ code: 'claims/path', where, saw: `${describe(path)} beside ${describe(seen)}, the same but for letter case`, expected: 'names that differ in more than case' });
  }
  return problems;
}
