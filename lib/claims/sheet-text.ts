import { findUnkeepable } from '@/lib/kernel/plain-text';
import type { Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import { describe } from './pointer';

export const maxSheetBytes = 4 * 2 ** 20;
const maxBytes = maxSheetBytes;
const maxDepth = 64;

/** Bytes of `claim.json` to a JSON value; a name given twice is refused, since only one of the two would count. */
export function parseSheetText(bytes: Uint8Array): Result<unknown, Problem[]> {
  if (bytes.length > maxBytes) return refuse('claims/too-large', `${bytes.length} bytes`, `at most ${maxBytes} bytes of JSON`);
  let text: string;
  try {
    text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return refuse('claims/not-json', 'bytes that are not UTF-8', 'JSON text in UTF-8');
  }
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch (thrown) {
    return refuse('claims/not-json', placeOf(thrown, text), 'JSON text', 'JSON takes no comments, no trailing commas and no NaN.');
  }
  const faults = nameFaults(text);
  if (faults.length > 0) return err(faults);
  const unkeepable = findUnkeepable(value);
  return unkeepable ? err([{ code: 'claims/bad-text', ...unkeepable, expected: 'text of whole characters' }]) : ok(value);
}

const refuse = (code: string, saw: string, expected: string, hint?: string): Result<never, Problem[]> =>
  err([{ code, where: '', saw, expected, ...(hint ? { hint } : {}) }]);

function placeOf(thrown: unknown, text: string): string {
  const position = /position (\d+)/.exec(thrown instanceof Error ? thrown.message : '')?.[1];
  if (position === undefined) return 'text that ends early or is not JSON';
  const before = text.slice(0, Number(position));
  return `text that is not JSON at line ${before.split('\n').length}, column ${before.length - before.lastIndexOf('\n')}`;
}

interface Level {
  readonly names: Set<string> | null;
  path: string;
  index: number;
}

/** One pass over text that is known to be valid JSON, without recursion. */
function nameFaults(text: string): Problem[] {
  const problems: Problem[] = [];
  const levels: Level[] = [];
  const token = /"(?:[^"\\]|\\.)*"|[{}[\],]/gs;
  for (let found = token.exec(text); found; found = token.exec(text)) {
    const here = levels.at(-1);
    const part = found[0];
    if (levels.length > maxDepth) return [{ code: 'claims/too-deep', where: '', saw: `more than ${maxDepth} levels of brackets`, expected: 'a claim sheet' }];
    if (part === '{' || part === '[') levels.push({ names: part === '{' ? new Set() : null, path: here ? here.path + (here.names ? '' : `/${here.index}`) : '', index: 0 });
    else if (part === '}' || part === ']') levels.pop();
    else if (part === ',') {
      if (here) here.index++;
    } else if (here?.names && /^\s*:/.test(text.slice(token.lastIndex, token.lastIndex + 100))) note(here, JSON.parse(part) as string, levels, problems);
  }
  return problems;
}

function note(here: Level, name: string, levels: readonly Level[], problems: Problem[]): void {
  const above = levels.at(-2);
  const base = above ? above.path + (above.names ? '' : `/${above.index}`) : '';
  const where = `${above?.names ? above.path : base}/${name.replaceAll('~', '~0').replaceAll('/', '~1')}`;
  if (here.names?.has(name)) problems.push({ code: 'claims/name-twice', where, saw: `the name ${describe(name)} twice in one object`, expected: 'each name once', hint: 'Remove one of the two; a reader would see only the last.' });
  if (name === '__proto__') problems.push({ code: 'claims/unknown-name', where, saw: `the name ${describe(name)}`, expected: 'only names of the format' });
  here.names?.add(name);
  here.path = where;
}
