import { formatProblem } from '@/lib/kernel/problem';
import type { Figure } from '@/lib/engine/contract/measurement';
import { TableParser } from '@/lib/formats/text/table-parser';

export type Preview =
  | { readonly ok: true; readonly rows: number; readonly columns: number; readonly first: number; readonly last: number; readonly figure: Figure }
  | { readonly ok: false; readonly sentences: readonly string[] };

const POINTS = 1200;
const CHUNK = 1 << 20;

/** How many numbers the first line of data holds. */
export function countColumns(head: string): number {
  const line = head.split(/\r?\n/).find((l) => l.trim() !== '' && !/^\s*[#%!]/.test(l));
  return line === undefined ? 0 : line.trim().split(/[\s,;]+/).filter(Boolean).length;
}

/** Reads a table in this browser, a chunk at a time, before anything is declared: what stands in each column is not known yet. */
export async function previewFile(name: string, file: Blob): Promise<Preview> {
  if (/\.(gz|zip|npz|npy|h5|hdf5)$/i.test(name)) return { ok: false, sentences: ['No preview of this kind of file. Declare it as a waveform to see what it holds; the check reads it on the server.'] };
  const columns = countColumns(await file.slice(0, 1 << 16).text());
  if (columns < 2) return { ok: false, sentences: [`${name}: saw ${columns === 0 ? 'no line of numbers' : 'one column'}; expected a table with two columns or more.`] };
  const names = Array.from({ length: columns }, (_, i) => (i < 3 ? `column ${i + 1}` : '_'));
  const parser = new TableParser(name, names);
  for (let at = 0; at < file.size; at += CHUNK) {
    if (!parser.push(new Uint8Array(await file.slice(at, at + CHUNK).arrayBuffer()))) break;
    await new Promise((go) => setTimeout(go));
  }
  const table = parser.finish();
  if (!table.ok) return { ok: false, sentences: table.error.map(formatProblem) };
  const [x, ...ys] = table.value.columns.filter((c) => c !== null);
  if (!x || ys.length === 0) return { ok: false, sentences: [`${name}: nothing to draw.`] };
  return { ok: true, rows: table.value.rows, columns, first: x[0] ?? NaN, last: x[table.value.rows - 1] ?? NaN, figure: drawn(x, ys, table.value.rows) };
}

function drawn(x: Float64Array, ys: readonly Float64Array[], rows: number): Figure {
  const step = Math.max(1, Math.floor(rows / POINTS));
  const index = Array.from({ length: Math.ceil(rows / step) }, (_, i) => i * step);
  const positive = ys.length === 1 && index.every((i) => (ys[0]?.[i] ?? 0) > 0 && (x[i] ?? 0) > 0);
  const scale = positive ? ('log' as const) : ('linear' as const);
  const pick = (values: Float64Array): number[] => index.map((i) => values[i] ?? NaN);
  return {
    kind: 'waveforms',
    title: 'As read in this browser',
    x: { label: 'column 1', unit: '', scale, values: pick(x) },
    series: ys.map((y, i) => ({ label: `column ${i + 2}`, unit: '', role: i === 0 ? ('claimed' as const) : ('recomputed' as const), axis: 'left' as const, scale, values: pick(y).map((v) => (Number.isFinite(v) ? v : null)) })),
  };
}
