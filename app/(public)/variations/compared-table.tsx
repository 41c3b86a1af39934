import { formatAt } from '@/app/_ui/claim/setting-names';
import { formatNumber } from '@/app/_ui/math/format-number';
import { formatWithUncertainty } from '@/app/_ui/math/format-uncertainty';
import { unitText } from '@/app/_ui/math/units';
import { Table } from '@/app/_ui/primitives/table';
import type { ComparedPoint } from './compare';
import { inTolerancesText } from './variation-words';

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
  const numberOf = (side: ComparedPoint['official'], none: string) => (side ? formatWithUncertainty(side.value, side.expandedUncertainty, unit) : none);
  return (
    <Table caption={`${claimId}: ${officialWord} and varied numbers`}>
      <thead>
        <tr>
          {swept && <th scope="col">At</th>}
          <th scope="col" className="num">{officialWord.replace(/^./, (c) => c.toUpperCase())} ± <i>U</i></th>
          <th scope="col" className="num">Varied ± <i>U</i></th>
          <th scope="col" className="num">Apart by</th>
          <th scope="col" className="num"><abbr title="the claim’s tolerance">In units of <i>T</i></abbr></th>
        </tr>
      </thead>
      <tbody>
        {points.map((point, i) => (
          <tr key={i}>
            {swept && <th scope="row" className="font-normal!">{formatAt(point.at) || 'one number'}</th>}
            <td className="num">{numberOf(point.official, 'no number here')}</td>
            <td className="num font-semibold">{numberOf(point.varied, waiting ?? 'not varied')}</td>
            <td className="num">{apartText(point.apart, { scale, unit })}</td>
            <td className="num">{point.apart === null ? '—' : inTolerancesText(point.inTolerances)}</td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
