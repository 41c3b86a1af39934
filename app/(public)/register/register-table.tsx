import type { Route } from 'next';
import Link from 'next/link';
import { VerdictStrip } from '@/app/_ui/verdict/verdict-chip';
import type { VerdictState } from '@/app/_ui/verdict/verdict-words';
import { formatDay } from '@/app/views/dates';
import { quantityWord } from '@/app/views/quantity-word';
import { RECORD_STANDING_WORDS } from '@/lib/badges/standing';
import { isVerdict } from '@/lib/services/records/register-words';
import type { RegisterRow } from '@/lib/services/records/record-view';
import { noiseWord } from './filter-words';
import { SortHead, type TableOrder } from './sort-head';

const asState = (verdict: string): VerdictState => (isVerdict(verdict) ? verdict : 'waiting');

interface RegisterTableProps {
  readonly rows: readonly RegisterRow[];
  readonly caption?: string;
  /** How the rows stand and where another order is; without it the heads are plain. */
  readonly order?: TableOrder;
}

/** Rows of the register; under 640 px each row is a card of its own and keeps its roles. */
export function RegisterTable({ rows, caption = 'Records, the newest entry first', order }: RegisterTableProps) {
  return (
    <table role="table" className="register w-full text-cell">
      <caption className="sr-only">{caption}</caption>
      <thead role="rowgroup" className="max-sm:sr-only">
        <tr role="row" className="text-left text-small text-ink-2 [&>*]:pb-2 [&>*]:font-semibold">
          <SortHead label="Record" by="title" order={order} />
          <th role="columnheader" scope="col" className="max-mid:hidden">Quantity and noise curve</th>
          <th role="columnheader" scope="col">Claims</th>
          <th role="columnheader" scope="col">Standing</th>
          <SortHead label="Entered" by="date" order={order} className="sm:text-right" />
        </tr>
      </thead>
      <tbody role="rowgroup">{rows.map((row) => <Row key={row.id} row={row} />)}</tbody>
    </table>
  );
}

function Row({ row }: { readonly row: RegisterRow }) {
  return (
    <tr role="row" className="align-top shadow-[inset_0_1px_var(--hair)] max-sm:grid max-sm:grid-cols-[minmax(0,1fr)_auto] max-sm:gap-x-4 max-sm:gap-y-1 max-sm:py-3 [&>*]:py-3 max-sm:[&>*]:py-0">
      <th role="rowheader" scope="row" className="pr-6 text-left font-normal max-sm:col-span-2 max-sm:pr-0">
        <Link href={`/records/${row.id}` as Route} className={`font-serif text-[17px]/[24px] font-semibold text-ink no-underline hover:underline ${row.standing === 'struck' ? 'line-through' : ''}`}>{row.title}</Link>
        <span className="block text-small text-ink-2">{row.authors.join(', ')}</span>
        <span className="block text-small text-ink-2 mid:hidden">{[...row.quantities.map(quantityWord), ...curves(row)].join(', ')}</span>
      </th>
      <td role="cell" className="pr-6 text-ui max-mid:hidden">{row.quantities.map(quantityWord).join(', ')}<span className="block text-small text-ink-2">{curves(row).join('; ') || 'no curve needed'}</span></td>
      <td role="cell" className="pr-6"><VerdictStrip verdicts={row.verdicts.map((verdict, i) => ({ id: `claim ${i + 1}`, verdict: asState(verdict) }))} /></td>
      <td role="cell" className="pr-6 text-ui max-sm:pr-0 max-sm:text-right"><Standing row={row} /></td>
      <td role="cell" className="whitespace-nowrap max-sm:col-span-2 max-sm:text-ui sm:text-right">{formatDay(row.enteredOn)}<span className="text-small text-ink-2 max-sm:ml-3 sm:block">revision {row.revision}</span></td>
    </tr>
  );
}

const curves = (row: RegisterRow): readonly string[] => row.noises.filter((noise) => noise !== 'none').map(noiseWord);

function Standing({ row }: { readonly row: RegisterRow }) {
  if (row.standing === 'entered') return <span className="whitespace-nowrap">Level {row.level}</span>;
  return (
    <>
      <b className="font-semibold whitespace-nowrap">{RECORD_STANDING_WORDS[row.standing]}</b>
      <span className="block text-small whitespace-nowrap text-ink-2">since {formatDay(row.standingSince)}</span>
    </>
  );
}
