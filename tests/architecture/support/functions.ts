import ts from 'typescript';
import { lineOf, type SourceFile } from './source-files';

export interface FunctionSize {
  readonly where: string;
  readonly name: string;
  readonly lines: number;
  /** Draws: a name with a capital in a .tsx file. */
  readonly isComponent: boolean;
}

/** Functions that have a body of their own; a callback counts within the one it stands in. */
export function functionsOf(file: SourceFile): FunctionSize[] {
  const found: FunctionSize[] = [];
  const visit = (node: ts.Node): void => {
    const named = namedFunction(node);
    if (named) found.push(measure(file, named.name, named.body));
    ts.forEachChild(node, visit);
  };
  visit(file.syntax);
  return found;
}

function namedFunction(node: ts.Node): { name: string; body: ts.Node } | undefined {
  if ((ts.isFunctionDeclaration(node) || ts.isMethodDeclaration(node)) && node.body)
    return { name: node.name?.getText() ?? 'default', body: node };
  if (!ts.isVariableDeclaration(node) && !ts.isPropertyAssignment(node)) return undefined;
  const value = node.initializer;
  if (!value || !(ts.isArrowFunction(value) || ts.isFunctionExpression(value))) return undefined;
  return { name: node.name.getText(), body: value };
}

function measure(file: SourceFile, name: string, node: ts.Node): FunctionSize {
  const start = lineOf(file, node);
  const end = file.syntax.getLineAndCharacterOfPosition(node.getEnd()).line + 1;
  return { where: `${file.path}:${start}`, name, lines: end - start + 1, isComponent: file.path.endsWith('.tsx') && /^[A-Z]/.test(name) };
}
