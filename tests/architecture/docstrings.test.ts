import ts from 'typescript';
import { describe, expect, it } from 'vitest';
import { filesIn, lineOf, type SourceFile } from './support/source-files';

/** In this order; every one of them, on every exported function that computes rather than rewords. */
const LABELS = ['Shape', 'Units', 'Error', 'Fails', 'Source'];
/** A function of fewer lines is its own explanation. */
const SHORT_LINES = 8;

interface Exported {
  readonly where: string;
  readonly doc: string;
  readonly lines: number;
}

function exportedFunctions(file: SourceFile): Exported[] {
  return file.syntax.statements.flatMap((statement) => {
    if (!isExported(statement) || !isFunction(statement)) return [];
    const doc = ts.getJSDocCommentsAndTags(statement)[0]?.getText() ?? '';
    const lines = statement.getText().split('\n').length;
    return [{ where: `${file.path}:${lineOf(file, statement)}`, doc, lines }];
  });
}

const isExported = (statement: ts.Statement): boolean =>
  ts.canHaveModifiers(statement) && (ts.getModifiers(statement) ?? []).some(({ kind }) => kind === ts.SyntaxKind.ExportKeyword);

const isFunction = (statement: ts.Statement): boolean =>
  ts.isFunctionDeclaration(statement) ||
  (ts.isVariableStatement(statement) &&
    statement.declarationList.declarations.some(({ initializer }) => initializer !== undefined && ts.isArrowFunction(initializer)));

const labelsOf = (doc: string): string[] =>
  [...doc.matchAll(/^\s*\* (Shape|Units|Error|Fails|Source): +\S/gm)].map(([, label]) => label ?? '');

describe('the engine says what each of its functions takes, gives and rests on', () => {
  const functions = filesIn('lib/engine').flatMap(exportedFunctions);

  it('every exported function of more than a few lines has all five labels, in order', () => {
    const long = functions.filter(({ lines }) => lines > SHORT_LINES);
    console.log(`${functions.length} exported functions in the engine, ${long.length} of more than ${SHORT_LINES} lines`);
    expect(long.length).toBeGreaterThan(0);
    expect(
      long
        .filter(({ doc }) => labelsOf(doc).join() !== LABELS.join())
        .map(({ where, doc }) => `${where} has ${labelsOf(doc).join(', ') || 'no label'}`),
    ).toEqual([]);
  });

  it('labels that are there stand in order, each once', () => {
    const labelled = functions.filter(({ doc }) => labelsOf(doc).length > 0);
    expect(
      labelled
        .filter(({ doc }) => labelsOf(doc).join() !== LABELS.filter((label) => labelsOf(doc).includes(label)).join())
        .map(({ where }) => where),
    ).toEqual([]);
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
