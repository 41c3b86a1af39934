import { readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';

/** Reads the project as text: what these tests say is about the source, not about one run of it. */
export const ROOT = fileURLToPath(new URL('../../..', import.meta.url));

export interface SourceFile {
  /** Relative to the project, with forward slashes. */
  readonly path: string;
  readonly text: string;
  readonly syntax: ts.SourceFile;
}

export function filesIn(folder: string, extensions: readonly string[] = ['.ts', '.tsx']): SourceFile[] {
  return readdirSync(path.join(ROOT, folder), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && extensions.includes(path.extname(entry.name)) && !entry.name.includes('.d.'))
    .map((entry) => readSource(path.relative(ROOT, path.join(entry.parentPath, entry.name))))
    .sort((a, b) => a.path.localeCompare(b.path));
}

function readSource(file: string): SourceFile {
  const text = readFileSync(path.join(ROOT, file), 'utf8');
  return { path: file, text, syntax: ts.createSourceFile(file, text, ts.ScriptTarget.Latest, true) };
}

export interface Import {
  /** `lib/kernel/result` for our own, `pkg:zod` or `node:crypto` for others'. */
  readonly target: string;
  readonly typeOnly: boolean;
  readonly line: number;
}

export function importsOf(file: SourceFile): Import[] {
  const found: Import[] = [];
  const visit = (node: ts.Node): void => {
    const specifier = specifierOf(node);
    if (specifier !== undefined)
      found.push({ target: resolve(file.path, specifier), typeOnly: isTypeOnly(node), line: lineOf(file, node) });
    ts.forEachChild(node, visit);
  };
  visit(file.syntax);
  return found;
}

function specifierOf(node: ts.Node): string | undefined {
  if ((ts.isImportDeclaration(node) || ts.isExportDeclaration(node)) && node.moduleSpecifier && ts.isStringLiteral(node.moduleSpecifier))
    return node.moduleSpecifier.text;
  const isDynamic = ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword;
  const argument = isDynamic ? node.arguments[0] : undefined;
  return argument && ts.isStringLiteralLike(argument) ? argument.text : undefined;
}

function isTypeOnly(node: ts.Node): boolean {
  if (ts.isExportDeclaration(node)) return node.isTypeOnly;
  if (!ts.isImportDeclaration(node) || !node.importClause) return false;
  const { isTypeOnly: whole, name, namedBindings } = node.importClause;
  if (whole) return true;
  return (
    name === undefined &&
    namedBindings !== undefined &&
    ts.isNamedImports(namedBindings) &&
    namedBindings.elements.every((element) => element.isTypeOnly)
  );
}

function resolve(from: string, specifier: string): string {
  if (specifier.startsWith('.')) return path.join(path.dirname(from), specifier);
  if (specifier.startsWith('@/')) return specifier.slice(2);
  if (specifier.startsWith('node:')) return specifier;
  return `pkg:${specifier
    .split('/')
    .slice(0, specifier.startsWith('@') ? 2 : 1)
    .join('/')}`;
}

export const lineOf = (file: SourceFile, node: ts.Node): number =>
  file.syntax.getLineAndCharacterOfPosition(node.getStart(file.syntax)).line + 1;

/** `engine` for lib/engine/…, `ui` for app/_ui/…, `db`, `app`. */
export function roomOf(file: string): string {
  const [top, second = ''] = file.split('/');
  if (top === 'lib') return second.replace(/\.ts$/, '');
  if (top === 'app') return second === '_ui' ? 'ui' : 'app';
  return top ?? '';
}
