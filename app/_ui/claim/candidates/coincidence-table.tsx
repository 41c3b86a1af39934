import { Disclosure } from '../../primitives/disclosure';
import { formatNumber } from '../../math/format-number';
import { Table } from '../../primitives/table';
import type { ResultClaim } from '@/lib/pipeline/result';

const percent = (share: number): string => (share < 0.001 ? 'under 0.1 %' : `${formatNumber(100 * share, { significant: 2 })} %`);

/** Readings that fit and prove nothing: closed, with how often chance does as well. */
export function CoincidenceTable({ claim }: { readonly claim: ResultClaim }) {
  const rows = claim.candidates.filter(({ standing }) => standing === 'coincidence');
  if (rows.length === 0) return null;
  return (
    <Disclosure summary={`Fits that may be coincidence (${rows.length})`}>
      <Table caption={`Readings under which ${claim.id} would agree, each as likely to be chance`}>
        <thead><tr><th scope="col">Would agree if</th><th scope="col" className="num whitespace-normal!">Chance does as well</th><th scope="col" className="num whitespace-normal!">Readings tried</th><th scope="col">Other claims</th></tr></thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.id}>
              <th scope="row" className="min-w-[14ch] font-normal!">{row.readings.map(({ clause }) => clause).join('; or ')}</th>
              <td className="num">{percent(row.chance)}</td>
              <td className="num">{row.tried}</td>
              <td>{row.breaks.length > 0 ? `would part ${row.breaks.join(', ')}` : row.explains.length > 0 ? `also ${row.explains.join(', ')}` : '—'}</td>
            </tr>
          ))}
        </tbody>
      </Table>
    </Disclosure>
  );
}
