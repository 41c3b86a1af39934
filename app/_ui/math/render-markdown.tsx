import { toJsxRuntime } from 'hast-util-to-jsx-runtime';
import type { ReactNode } from 'react';
import { Fragment, jsx, jsxs } from 'react/jsx-runtime';
import rehypeKatex from 'rehype-katex';
import rehypeSanitize, { defaultSchema } from 'rehype-sanitize';
import remarkGfm from 'remark-gfm';
import remarkMath from 'remark-math';
import remarkParse from 'remark-parse';
import remarkRehype from 'remark-rehype';
import { unified } from 'unified';
import { katexOptions } from './katex-options';
import { boundFormulas, makeFormulasReachable } from './bound-formulas';

/** Beyond this a text is no statement or comment: it is shown whole, but unset. */
const longestText = 100_000;

/*
 * No images: one would make the reader's browser call on a stranger. Classes only where the maths
 * needs them; whatever else arrives is dropped before any formula is set.
 */
const schema = {
  ...defaultSchema,
  tagNames: (defaultSchema.tagNames ?? []).filter((name) => !['img', 'picture', 'source', 'details', 'summary', 'input'].includes(name)),
  attributes: {
    ...defaultSchema.attributes,
    code: [['className', 'language-math', 'math-inline', 'math-display'] as [string, ...string[]]],
    input: [],
  },
  protocols: { ...defaultSchema.protocols, href: ['http', 'https', 'mailto'] },
};

const processor = unified()
  .use(remarkParse)
  .use(remarkGfm)
  .use(remarkMath)
  .use(remarkRehype)
  .use(rehypeSanitize, schema)
  .use(boundFormulas)
  .use(rehypeKatex, katexOptions)
  .use(makeFormulasReachable);

/** A document's own headings start below those of the page it stands on. */
const headings = {
  2: { h1: 'h2', h2: 'h2', h3: 'h3', h4: 'h4', h5: 'h5' },
  3: { h1: 'h3', h2: 'h3', h3: 'h4', h4: 'h5', h5: 'h6' },
} as const;
export type FirstHeading = keyof typeof headings;

const link = ({ href, children }: { readonly href?: string; readonly children?: ReactNode }) =>
  href?.startsWith('#') || (href?.startsWith('/') && !href.startsWith('//')) ? <a href={href}>{children}</a> : <a href={href} rel="nofollow noopener noreferrer ugc">{children}</a>;

/** What may be wider than its column scrolls in a frame of its own, which the keyboard reaches. */
const table = ({ children }: { readonly children?: ReactNode }) => <div className="overflow-x-auto" tabIndex={0} role="group" aria-label="Table"><table>{children}</table></div>;
const pre = ({ children }: { readonly children?: ReactNode }) => <pre tabIndex={0} role="group" aria-label="Text as typed">{children}</pre>;

/** Markdown with maths, from anyone: raw HTML is off, and sanitising comes before the formulas. */
export function renderMarkdown(source: string, firstHeading: FirstHeading = 3): ReactNode {
  if (source.length > longestText) return <pre className="overflow-x-auto whitespace-pre-wrap">{source}</pre>;
  const tree = processor.runSync(processor.parse(source));
  return toJsxRuntime(tree, { Fragment, jsx, jsxs, components: { ...headings[firstHeading], a: link, table, pre } }) as ReactNode;
}

export const Prose = ({ source, firstHeading }: { readonly source: string; readonly firstHeading?: FirstHeading }) => (
  <div className="prose">{renderMarkdown(source, firstHeading)}</div>
);
