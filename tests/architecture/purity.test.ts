import ts from 'typescript';
import { describe, expect, it } from 'vitest';
import { PURE } from './support/import-table';
import { filesIn, lineOf, type SourceFile } from './support/source-files';

/** Clocks, dice and the outside world are arguments, or the same input would not give the same bytes. */
const MEMBERS: readonly (readonly [string, string])[] = [
  ['Date', 'now'],
  ['Math', 'random'],
  ['performance', 'now'],
  ['crypto', 'randomUUID'],
  ['crypto', 'getRandomValues'],
];
const GLOBALS: ReadonlySet<string> = new Set(['process', 'fetch', 'globalThis', 'setTimeout', 'setInterval', 'require']);

function impurities(file: SourceFile): string[] {
  const found: string[] = [];
  const visit = (node: ts.Node): void => {
    const what = impurityOf(node);
    if (what) found.push(`${file.path}:${lineOf(file, node)}: ${what}`);
    ts.forEachChild(node, visit);
  };
  visit(file.syntax);
  return found;
}

function impurityOf(node: ts.Node): string | undefined {
  if (ts.isNewExpression(node) && node.expression.getText() === 'Date' && !node.arguments?.length) return 'new Date()';
  if (ts.isPropertyAccessExpression(node)) {
    const pair = MEMBERS.find(([object, member]) => node.expression.getText() === object && node.name.text === member);
    return pair?.join('.');
  }
  if (!ts.isIdentifier(node) || !GLOBALS.has(node.text)) return undefined;
  return isUseOfGlobal(node) ? node.text : undefined;
}

/** `run.process`, `{ process: 1 }` and types named so are other things of the same name. */
function isUseOfGlobal({ parent, text }: ts.Identifier): boolean {
  if (ts.isPropertyAccessExpression(parent)) return parent.expression.getText() === text;
  return ts.isCallExpression(parent) && parent.expression.getText() === text;
}

describe('same input, same bytes', () => {
  it.each(PURE)('%s asks neither the clock, nor dice, nor the outside world', (room) => {
    expect(filesIn(`lib/${room}`).flatMap(impurities)).toEqual([]);
  });

  it.each(['Date.now()', 'new Date()', 'Math.random()', 'process.env.X', 'await fetch("x")', 'setTimeout(f, 1)'])(
    'would notice %s',
    (text) => {
      const path = 'lib/engine/x.ts';
      expect(impurities({ path, text, syntax: ts.createSourceFile(path, text, ts.ScriptTarget.Latest, true) })).toHaveLength(1);
    },
  );
});
