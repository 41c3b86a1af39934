import type { Element, ElementContent, Root } from 'hast';
import katex from 'katex';
import { formulaBudget, katexOptions, longestFormula } from './katex-options';

type Visit = (element: Element) => void;

const classNames = (element: Element): readonly unknown[] => (Array.isArray(element.properties.className) ? element.properties.className : []);
const marks: readonly unknown[] = ['math-inline', 'math-display', 'language-math'];
const isFormula = (element: Element) => classNames(element).some((name) => marks.includes(name));

function walk(node: Root | Element, visit: Visit): void {
  for (const child of node.children) {
    if (child.type !== 'element') continue;
    visit(child);
    walk(child, visit);
  }
}

const textOf = (node: ElementContent): string => (node.type === 'text' ? node.value : node.type === 'element' ? node.children.map(textOf).join('') : '');

function measure(tex: string, displayMode: boolean): number {
  try {
    return katex.renderToString(tex, { ...katexOptions, displayMode }).length;
  } catch {
    return 0;
  }
}

/** A formula too long, or one too many, stays as its source: the page stays small whatever is written. */
export const boundFormulas = () => (tree: Root) => {
  let left = formulaBudget;
  walk(tree, (element) => {
    if (!isFormula(element)) return;
    const tex = textOf(element);
    const cost = tex.length > longestFormula || left <= 0 ? Infinity : measure(tex, classNames(element).includes('math-display'));
    left -= Number.isFinite(cost) ? cost : 0;
    if (!Number.isFinite(cost) || left < 0) element.properties = { className: ['unset-math'], title: 'This formula is too long to be set; its source is shown.' };
  });
};

/** A wide formula scrolls in its own frame, which the keyboard reaches. */
export const makeFormulasReachable = () => (tree: Root) => {
  walk(tree, (element) => {
    if (!classNames(element).includes('katex-display')) return;
    element.properties = { ...element.properties, tabIndex: 0, role: 'group', ariaLabel: 'Formula' };
  });
};
