import { Disclosure } from '../../primitives/disclosure';
import { NumberCell } from '../../math/number-cell';
import { unitText } from '../../math/units';
import { Table } from '../../primitives/table';
import type { ResultClaim } from '@/lib/pipeline/result';
import { formatAt } from '../setting-names';

/** Enough to see which way a reading moves the number; the result holds ten digits. */
const DIGITS = 5;

/** Every single reading with its numbers, or why it has none: what was tried is there to be argued with. */
export function TriedTable({ claim }: { readonly claim: ResultClaim }) {
  const rows = (claim.search?.readings ?? []).filter(({ clause }) => clause !== undefined);
  const pairs = (claim.search?.readings ?? []).length - rows.length;
  if (rows.length === 0) return null;
  // Of many points only some were asked.
  const asked = claim.points.flatMap(({ at }, index) => (rows.some(({ values }) => typeof values?.[index] === 'number') ? [{ at, index }] : []));
  return (
    <Disclosure summary={`All single readings tried (${rows.length})`}>
      <p className="mb-2 text-small text-ink-2">By route A alone{claim.unit !== '' && `, in ${unitText(claim.unit)}`}; <i>U</i> as beside the recomputed number.{pairs > 0 && ` The ${pairs === 1 ? 'pair stands' : `${pairs} pairs stand`} in the result.`}</p>
      <Table caption={`Single readings of ${claim.id} with the number that each gives`}>
        <thead><tr><th scope="col">If</th>{asked.map(({ at, index }) => <th key={index} scope="col" className="num">{formatAt(at) || 'The number'}</th>)}</tr></thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.id}>
              <th scope="row" className="font-normal!">{row.clause}</th>
              {row.values ? asked.map(({ index }) => <td key={index} className="num"><NumberCell value={row.values?.[index] ?? null} significant={DIGITS} unknown="none" /></td>) : <td colSpan={Math.max(1, asked.length)}>no number: {row.because}</td>}
            </tr>
          ))}
        </tbody>
      </Table>
    </Disclosure>
  );
}
