import { formatAt } from '../setting-names';
import { latexNumber, latexText } from './latex-text';
import { clausesOf, noiseText, valueText, type Printable } from './printed-sentence';
import { sourceWords } from './print-source';
import type { ClausePlace } from './setting-clauses';

/** Names the columns of the rows that follow. */
export const LATEX_COLUMNS = '% claim & quantity & at & claimed & recomputed +- U (k = 2, of the computation alone) & noise curve & band & maximised over & mass & modes & further settings & verdict & source';

const NONE = '--';

const withUnit = (printed: string, unit: string): string => latexNumber(`${printed} ${unit}`.trim());

/** A row of a LaTeX table: the same facts as the sentence, a column each. */
export function latexRow(printable: Printable): string {
  const { heading, claim, point, source } = printable;
  const clauses = clausesOf(printable);
  const column = (place: ClausePlace): string => latexText(clauses.filter((clause) => clause.place === place).map((clause) => clause.text.replace(/^(band|maximised over) /, '')).join('; ')) || NONE;
  const noise = noiseText(heading.noiseSource, source.files)?.replace(/^noise curve /, '');
  const cells = [
    latexText(claim.id),
    latexText(heading.title),
    latexNumber(formatAt(point.at)) || NONE,
    withUnit(point.printed, heading.unit),
    point.value === null ? 'not computable' : latexNumber(valueText(printable)),
    noise ? latexText(noise) : NONE,
    column('band'),
    column('maximised'),
    column('mass'),
    column('modes'),
    column('other'),
    latexText(point.verdict.replaceAll('-', ' ')),
    latexText(sourceWords(source)),
  ];
  return `${cells.join(' & ')} ${String.raw`\\`}`;
}

export const latexTable = (rows: readonly string[]): string => [LATEX_COLUMNS, ...rows].join('\n');

/** Rows of a sweep with what all of them end in told once. */
export function rowsOfSweep(rows: readonly string[]): { readonly own: readonly string[]; readonly shared: string } {
  const first = rows[0] ?? '';
  let length = rows.length < 2 ? 0 : first.length;
  for (const row of rows) while (length > 0 && !row.endsWith(first.slice(first.length - length))) length--;
  return { own: rows.map((row) => row.slice(0, row.length - length)), shared: first.slice(first.length - length) };
}
