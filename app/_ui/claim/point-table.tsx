import type { ResultClaim } from '@/lib/pipeline/result';
import { formatNumber } from '../math/format-number';
import { formatWithUncertainty } from '../math/format-uncertainty';
import { unitText } from '../math/units';
import { Disclosure } from '../primitives/disclosure';
import { Table } from '../primitives/table';
import { VerdictChip } from '../verdict/verdict-chip';
import type { ClaimHeading } from './record-view';
import { formatAt } from './setting-names';

/** Every point of a long sweep, for which the claim's own rows show only the ends and the worst. */
export function PointTable({ claim, heading }: { readonly claim: ResultClaim; readonly heading: ClaimHeading }) {
  return (
    <Disclosure summary="Show them as a table">
      <Table caption={`All points of ${claim.id}`}>
        <thead><tr><th scope="col">At</th><th scope="col" className="num">Claimed</th><th scope="col" className="num">Recomputed ± <i>U</i></th><th scope="col" className="num">Apart by</th><th scope="col">Verdict</th></tr></thead>
        <tbody>
          {claim.points.map((point, i) => (
            <tr key={i}>
              <th scope="row" className="font-normal!">{formatAt(point.at)}</th>
              <td className="num">{`${point.printed} ${unitText(heading.unit)}`.trim()}</td>
              <td className="num">{formatWithUncertainty(point.value, point.expandedUncertainty, claim.unit)}</td>
              <td className="num">{point.apart === null ? '—' : heading.scale === 'ln' ? `${formatNumber(Math.expm1(point.apart) * 100, { significant: 2, signed: true })} %` : formatNumber(point.apart, { significant: 2, signed: true })}</td>
              <td><VerdictChip state={point.verdict} bare />{point.because && <p className="max-w-[40ch] text-small text-ink-2">{point.because}</p>}</td>
            </tr>
          ))}
        </tbody>
      </Table>
    </Disclosure>
  );
}
