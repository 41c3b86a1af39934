import type { ResultClaim } from '@/lib/pipeline/result';
import { decimalsFor } from '../math/format-number';
import { NumberCell, Unknown } from '../math/number-cell';
import { Table } from '../primitives/table';
import { formatAt } from './setting-names';

/** So many decimals that the two routes are seen to part, or to be equal to the last bit. */
export function decimalsThatPart(a: number, b: number): number {
  const apart = Math.abs(a - b);
  const bits = Math.max(Math.abs(a), Math.abs(b)) || 1;
  return apart > 0 ? decimalsFor(apart, 2) : decimalsFor(bits, 15);
}

/** Values of the two routes and their difference, at the points where both ran. */
export function RouteTable({ claim }: { readonly claim: ResultClaim }) {
  const rows = claim.points.filter((_, i) => claim.routeB.includes(i));
  if (rows.length === 0) return <p className="text-ui text-ink-2">Route B has not run at any point of this claim.</p>;
  return (
    <Table caption={`Routes A and B of ${claim.id} and their difference`}>
      <thead><tr><th scope="col">At</th><th scope="col" className="num">Route A</th><th scope="col" className="num">Route B</th><th scope="col" className="num">A − B</th></tr></thead>
      <tbody>
        {rows.map((point, i) => {
          const { A, B } = point.routes;
          const decimals = A !== null && B !== null ? decimalsThatPart(A, B) : 6;
          return (
            <tr key={i}>
              <th scope="row" className="font-normal!">{formatAt(point.at) || 'single value'}</th>
              <td className="num"><NumberCell value={A} decimals={decimals} plain={A !== null && Math.abs(A) >= 1e-3} unit={claim.unit} unknown="not computable" /></td>
              <td className="num"><NumberCell value={B} decimals={decimals} plain={B !== null && Math.abs(B) >= 1e-3} unit={claim.unit} unknown="not computable" /></td>
              <td className="num">{A !== null && B !== null ? <NumberCell value={A - B} significant={2} unit={claim.unit} /> : <Unknown />}</td>
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}
