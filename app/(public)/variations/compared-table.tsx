import { formatAt } from '@/app/_ui/claim/setting-names';
import { formatNumber } from '@/app/_ui/math/format-number';
import { unitText } from '@/app/_ui/math/units';
import { Table } from '@/app/_ui/primitives/table';
import type { ComparedPoint } from './compare';
import { inTolerancesText } from './variation-words';
import { VariedNumber } from './varied-number';

interface TableProps {
  readonly claimId: string;
  readonly points: readonly ComparedPoint[];
  readonly unit: string;
  readonly scale: 'absolute' | 'ln';
  /** What stands where the varied number is still to come, or did not come. */
  readonly waiting: string | null;
  /** `official`, or `checked` for a draft. */
  readonly officialWord: string;
}

const apartText = (apart: number | null, { scale, unit }: Pick<TableProps, 'scale' | 'unit'>): string =>
  apart === null ? '—' : scale === 'ln' ? `${formatNumber(Math.expm1(apart) * 100, { significant: 2, signed: true })} %` : `${formatNumber(apart, { significant: 2, signed: true })} ${unitText(unit)}`.trim();

/** The number that stands beside the one that would be, place by place. */
export function ComparedTable({ claimId, points, unit, scale, waiting, officialWord }: TableProps) {
  const swept = points.some((p) => Object.keys(p.at).length > 0);
  const title = officialWord.replace(/^./, (c) => c.toUpperCase());
  const numberOf = (side: ComparedPoint['official'], { against }: ComparedPoint, none: string) => (side ? <VariedNumber value={side.value} u={side.expandedUncertainty} unit={unit} against={against} /> : none);
  return (
    <Table className="stacks" caption={`${claimId}: ${officialWord} and varied numbers`}>
      <thead role="rowgroup">
        <tr role="row">
          {swept && <th role="columnheader" scope="col">At</th>}
          <th role="columnheader" scope="col" className="num">{title} ± <i>U</i></th>
          <th role="columnheader" scope="col" className="num">Varied ± <i>U</i></th>
          <th role="columnheader" scope="col" className="num">Apart by</th>
          <th role="columnheader" scope="col" className="num"><abbr title="the claim’s tolerance">In units of <i>T</i></abbr></th>
        </tr>
      </thead>
      <tbody role="rowgroup">
        {points.map((point, i) => (
          <tr key={i} role="row">
            {swept && <th role="rowheader" scope="row" className="font-normal!">{formatAt(point.at) || 'one number'}</th>}
            <td role="cell" className="num" data-l={`${title} ± U`}>{numberOf(point.official, point, 'no number here')}</td>
            <td role="cell" className="num font-semibold" data-l="Varied ± U">{numberOf(point.varied, point, waiting ?? 'not varied')}</td>
            <td role="cell" className="num" data-l="Apart by">{apartText(point.apart, { scale, unit })}</td>
            <td role="cell" className="num" data-l="In units of T">{point.apart === null ? '—' : inTolerancesText(point.inTolerances)}</td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
