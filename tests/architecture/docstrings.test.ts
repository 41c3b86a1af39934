import path from 'node:path';
import ts from 'typescript';
import { describe, expect, it } from 'vitest';
import { filesIn, importsOf, lineOf, type SourceFile } from './support/source-files';

/** In this order; every one of them, on every function that others than its neighbours call. */
const LABELS = ['Shape', 'Units', 'Error', 'Fails', 'Source'];
/** A function of fewer lines is its own explanation. */
const SHORT_LINES = 8;

/** Sentences and recipes rather than numerics: their types say what there is to say. */
const DATA = /^lib\/engine\/(contract|findings|quantities)\//;

interface Exported {
  readonly file: string;
  readonly name: string;
  readonly where: string;
  readonly doc: string;
  readonly lines: number;
}

function exportedFunctions(file: SourceFile): Exported[] {
  return file.syntax.statements.flatMap((statement) => {
    const name = isExported(statement) ? functionName(statement) : undefined;
    if (name === undefined) return [];
    const doc = ts.getJSDocCommentsAndTags(statement)[0]?.getText() ?? '';
    return [
      {
        file: file.path,
        name,
        where: `${file.path}:${lineOf(file, statement)} ${name}`,
        doc,
        lines: statement.getText().split('\n').length,
      },
    ];
  });
}

const isExported = (statement: ts.Statement): boolean =>
  ts.canHaveModifiers(statement) && (ts.getModifiers(statement) ?? []).some(({ kind }) => kind === ts.SyntaxKind.ExportKeyword);

function functionName(statement: ts.Statement): string | undefined {
  if (ts.isFunctionDeclaration(statement)) return statement.name?.text;
  if (!ts.isVariableStatement(statement)) return undefined;
  return statement.declarationList.declarations.find(({ initializer }) => initializer && ts.isArrowFunction(initializer))?.name.getText();
}

/** `folder/file` of every import that crosses from one folder into another. */
function reachedFromOutside(files: readonly SourceFile[]): ReadonlySet<string> {
  const crossing = files.flatMap((file) => importsOf(file).filter(({ target }) => path.dirname(target) !== path.dirname(file.path)));
  return new Set(crossing.map(({ target }) => `${target}.ts`));
}

const labelsOf = (doc: string): string[] =>
  [...doc.matchAll(/^\s*\* (Shape|Units|Error|Fails|Source): +\S/gm)].map(([, label]) => label ?? '');

describe('the engine says what each of its functions takes, gives and rests on', () => {
  const functions = filesIn('lib/engine').filter(({ path: file }) => !DATA.test(file)).flatMap(exportedFunctions);
  const long = functions.filter(({ lines }) => lines > SHORT_LINES);
  const outside = reachedFromOutside(['lib', 'tests'].flatMap((folder) => filesIn(folder)));

  it('every exported function of more than a few lines has a comment', () => {
    expect(long.length).toBeGreaterThan(0);
    expect(long.filter(({ doc }) => doc.length < 20).map(({ where }) => where)).toEqual([]);
  });

  it('where another folder can call it, the comment has all five labels', () => {
    const reached = long.filter(({ file }) => outside.has(file));
    console.log(
      `${functions.length} exported functions in the engine, ${reached.length} of more than ${SHORT_LINES} lines in files that other folders use`,
    );
    const incomplete = reached.filter(({ doc }) => LABELS.some((label) => !labelsOf(doc).includes(label)));
    expect(incomplete.map(({ where, doc }) => `${where} has ${labelsOf(doc).join(', ') || 'no label'}`)).toEqual([]);
  });

  it('labels that are there stand in order, each once', () => {
    const disordered = functions.filter(
      ({ doc }) => labelsOf(doc).join() !== LABELS.filter((label) => labelsOf(doc).includes(label)).join(),
    );
    expect(disordered.map(({ where }) => where)).toEqual([]);
  });
});

describe('each room opens with what it is for', () => {
  it.each(['kernel', 'storage', 'mail', 'policy', 'reviews', 'verdicts', 'pipeline', 'jobs', 'http', 'claims', 'formats'])(
    'a file of %s begins with a comment of a paragraph',
    (room) => {
      const opening = filesIn(`lib/${room}`).map(({ text }) => /\/\*\*([\s\S]*?)\*\//.exec(text)?.[1] ?? '');
      expect(Math.max(...opening.map((comment) => comment.replace(/\s*\*\s*/g, ' ').trim().length))).toBeGreaterThan(120);
    },
  );
});
