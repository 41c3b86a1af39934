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
  const { plane } = figure;
  const header = plane ? [xLabel(figure), withUnit(plane.y.label, plane.y.unit), withUnit(plane.level.label, plane.level.unit)] : [xLabel(figure), ...figure.series.map((s) => withUnit(s.label, s.unit))];
  const rows = plane ? plane.y.values.flatMap((y, j) => figure.x.values.map((x, i) => [x, y, plane.level.values[j * figure.x.values.length + i] ?? null])) : figure.x.values.map((x, i) => [figure.x.words?.[i] ?? x, ...figure.series.map((s) => s.values[i] ?? null)]);
  const count = rows.length;
  const notes = [
    `${titleOf(figure, origin)}; ${origin.source}; claim ${origin.claimId}, ${origin.quantity}, ${pointWords(figure, origin)}`,
    `${count} points, all that the plot draws. They are a thinned copy for the eye: the verdict rests on the files themselves.`,
  ];
  return `${notes.map(comment).join('\r\n')}\r\n${Papa.unparse([header, ...rows], { escapeFormulae: true, newline: '\r\n' })}\r\n`;
}
