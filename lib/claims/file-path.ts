import type { Problem } from '@/lib/kernel/problem';
import { describe } from './pointer';

const expected = 'a relative path inside the sheet’s folder, such as "data/a.txt"';

/** Why a path that a sheet (or an archive) names is refused; null when it stays inside its folder. */
export function pathFault(path: string): string | null {
  if (path === '') return 'an empty path';
  if (path.length > 300) return 'a path of more than 300 characters';
  if (/[\u0000-\u001f\u007f]/.test(path)) return 'a path with control characters';
  if (path.includes('\\')) return `${describe(path)} with a backslash`;
  if (path.startsWith('/') || /^[A-Za-z]:/.test(path)) return `the absolute path ${describe(path)}`;
  const parts = path.split('/');
  if (parts.includes('..')) return `${describe(path)}, which climbs out of the folder`;
  if (parts.includes('.') || parts.includes('')) return `${describe(path)} with an empty or "." part`;
  return null;
}

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
