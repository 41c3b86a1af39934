import type { Figure } from '@/lib/engine/contract/measurement';
import Papa from 'papaparse';
import { pointWords, titleOf, withUnit, xLabel, type FigureOrigin } from './figure-words';

/** A comment is one line, whatever a title holds. */
const comment = (words: string): string => `# ${words.replace(/\s+/g, ' ')}`;

/**
 * All values of a figure as they were served, in full precision; a missing value is an empty cell.
 * Lines with # before the header say what it is; no cell can be taken for a formula by a spreadsheet.
 */
export function figureCsv(figure: Figure, origin: FigureOrigin): string {
  const header = [xLabel(figure), ...figure.series.map((s) => withUnit(s.label, s.unit))];
  const rows = figure.x.values.map((x, i) => [figure.x.words?.[i] ?? x, ...figure.series.map((s) => s.values[i] ?? null)]);
  const count = figure.x.values.length;
  const notes = [
    `${titleOf(figure, origin)}; ${origin.source}; claim ${origin.claimId}, ${origin.quantity}, ${pointWords(figure, origin)}`,
    `${count} points, all that the plot draws. They are a thinned copy for the eye: the verdict rests on the files themselves.`,
  ];
  return `${notes.map(comment).join('\r\n')}\r\n${Papa.unparse([header, ...rows], { escapeFormulae: true, newline: '\r\n' })}\r\n`;
}
