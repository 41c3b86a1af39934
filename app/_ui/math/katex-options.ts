import type { KatexOptions } from 'katex';

/** People's formulas and ours alike: nothing trusted, expansion bounded, sizes bounded, errors shown in the text's own ink. */
export const katexOptions: KatexOptions = {
  trust: false,
  maxExpand: 200,
  maxSize: 12,
  strict: 'ignore',
  throwOnError: false,
  errorColor: 'currentColor',
  output: 'htmlAndMathml',
};
export const longestFormula = 2000;
/** Bytes of markup that all formulas of one document may make together. */
export const formulaBudget = 1_000_000;
