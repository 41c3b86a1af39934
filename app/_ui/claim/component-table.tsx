import type { ResultClaim } from '@/lib/pipeline/result';
import { NumberCell } from '../math/number-cell';
import { UnitLabel } from '../math/unit-label';
import { Table } from '../primitives/table';
import { componentWords } from './component-names';
import { formatAt } from './setting-names';

const mostColumns = 5;
type Point = ResultClaim['points'][number];

/** Every point of a short sweep; of a long one the point furthest from its claim. */
function pointsToShow(points: readonly Point[]): readonly Point[] {
  if (points.length <= mostColumns) return points;
  return [points.reduce((far, next) => (Math.abs(next.apart ?? 0) > Math.abs(far.apart ?? 0) ? next : far))];
}

/** Does any point of the claim say more than its number? */
export const hasComponents = (claim: ResultClaim): boolean => claim.points.some(({ components }) => Object.keys(components ?? {}).length > 0);

/** What the computation gives beside the number: shifts, shares of modes, parts of a vector, checks. */
export function ComponentTable({ claim }: { readonly claim: ResultClaim }) {
  const points = pointsToShow(claim.points);
  const names = [...new Set(points.flatMap(({ components }) => Object.keys(components ?? {})))];
  const single = points.length === 1 && points.every(({ at }) => Object.keys(at).length === 0);
  return (
    <>
      <Table caption={`What comes with the number of ${claim.id}, by route A`}>
        <thead><tr><th scope="col">Beside the number</th>{points.map((point, i) => <th key={i} scope="col" className="num">{single ? 'Value' : formatAt(point.at)}</th>)}<th scope="col">Unit</th></tr></thead>
        <tbody>
          {names.map((name) => {
            const { label, unit } = componentWords(name, claim.quantity, claim.unit);
            return (
              <tr key={name}>
                <th scope="row" className="font-normal!">{label}</th>
                {points.map((point, i) => {
                  const value = point.components?.[name] ?? null;
                  return <td key={i} className="num"><NumberCell value={value} {...(Number.isInteger(value) ? { decimals: 0 } : { significant: 5 })} unknown="not known" /></td>;
                })}
                <td>{unit === '' ? '1' : <UnitLabel unit={unit} />}</td>
              </tr>
            );
          })}
        </tbody>
      </Table>
      <p className="mt-1 text-small text-ink-2">By route A, to five digits. These stand beside the number and have no uncertainty and no verdict of their own.</p>
    </>
  );
}
