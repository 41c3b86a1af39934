import Papa from 'papaparse';
import { database } from '@/db/client';
import { listDocuments, listRegisterClaims, type RegisterEntryRow } from '@/db/reads/records/register';
import type { RecordedClaim } from '@/lib/badges/record';
import type { ResultPoint } from '@/lib/pipeline/result';
import type { RegisterExport } from './export-register';
import { documentOf } from './record-document';

export const CSV_SHAPE = { name: 'records.csv', edition: 1, order: 'newest', limit: 100_000 } as const;
const batch = 50;

const columns = [
  'record', 'revision', 'title', 'authors', 'claim', 'quantity', 'unit', 'at', 'claimed', 'claimed_is', 'printed', 'recomputed', 'U', 'tolerance', 'verdict', 'noise', 'standing', 'entered', 'url',
] as const;
type Row = Readonly<Record<(typeof columns)[number], string | number | null>>;

/*
 * A cell that a spreadsheet would run is text with an apostrophe before it. Numbers are written from
 * numbers and stay what they are, minus sign and all. The library's own pattern misses a formula that
 * goes on after a line's end.
 */
const runs = /^(?:[\s\u0000-\u001f]*[=+\-@＝＋－＠]|[\t\r\n])/;

const lines = (cells: readonly (readonly (string | number | null)[])[]): string => `${Papa.unparse(cells.map((row) => [...row]), { escapeFormulae: runs, newline: '\r\n' })}\r\n`;

/** One row a point of a claim; of each record, the claims that fit the search. Some records at a time: a register outgrows memory. */
export async function* csvParts({ entries, ask, origin }: RegisterExport): AsyncGenerator<string> {
  yield lines([columns]);
  for (let i = 0; i < entries.length; i += batch) {
    const some = entries.slice(i, i + batch);
    const ids = some.map((entry) => entry.id);
    const documents = new Map((await listDocuments(database(), ids)).map((row) => [row.id, documentOf(row)]));
    const wanted = await listRegisterClaims(database(), ids, ask);
    const rows = some.flatMap((entry) =>
      wanted
        .filter((claim) => claim.recordId === entry.id)
        .flatMap(({ position, noise }) => rowsOf(entry, documents.get(entry.id)?.claims[position - 1], noise, origin)),
    );
    if (rows.length > 0) yield lines(rows.map((row) => columns.map((name) => row[name])));
  }
}

const rowsOf = (entry: RegisterEntryRow, claim: RecordedClaim | undefined, noise: string, origin: string): Row[] =>
  (claim?.points ?? []).map((point) => ({
    record: entry.id,
    revision: entry.revision,
    title: entry.title,
    authors: entry.authors.join('; '),
    claim: claim?.id ?? '',
    quantity: claim?.quantity ?? '',
    unit: claim?.unit ?? '',
    at: Object.entries(point.at).map(([name, value]) => `${name}=${value}`).join('; '),
    ...claimedOf(point),
    printed: point.printed,
    recomputed: finite(point.value),
    U: finite(point.expandedUncertainty),
    tolerance: finite(point.tolerance),
    verdict: point.verdict,
    noise,
    standing: entry.standing,
    entered: entry.enteredOn,
    url: `${origin}/records/${entry.id}`,
  }));

/** An empty cell is what is not known or does not apply; never nought. */
const finite = (value: number | null): number | null => (value !== null && Number.isFinite(value) ? value : null);

function claimedOf({ claimed }: ResultPoint): Pick<Row, 'claimed' | 'claimed_is'> {
  if (typeof claimed === 'number') return { claimed: finite(claimed), claimed_is: 'value' };
  return 'above' in claimed ? { claimed: finite(claimed.above), claimed_is: 'above' } : { claimed: finite(claimed.below), claimed_is: 'below' };
}
