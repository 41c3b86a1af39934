import Link from 'next/link';
import type { Route } from 'next';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { VerdictStrip } from '@/app/_ui/verdict/verdict-chip';
import type { QueueStep } from '@/lib/reviews/queue';
import type { QueueRow } from '@/lib/services/reviews/queue-view';
import { ActButton } from '../act-parts';
import { takeTriage } from '../review/actions';
import { Cell, HeadCell, StackedRow } from '../stacked-table';
import { RemindButton } from './remind-button';

const stepWords: Record<Exclude<QueueStep, 'take' | 'remind'>, string> = {
  assign: 'Choose referees',
  'send-to-review': 'Send to review',
  decide: 'Decide',
  look: 'Look at the run',
  open: 'Open',
};

const stepHref = (row: QueueRow): string => (row.next === 'decide' ? `/review/${row.submissionId}/decide` : `/review/${row.submissionId}`);

const BAR = { width: 180, height: 6 } as const;
/** The bar goes on past the day it is due, so that what is late is seen to be. */
const BEYOND = 1.5;

/** `day 25 of 21` says it is late; so does the word, for colour alone says nothing. */
function Days({ day, of }: QueueRow['ball']) {
  if (of === null) return <p className="text-small text-ink-2">day {day}</p>;
  const over = day - of;
  const at = (days: number): number => Math.min(BAR.width, (BAR.width * days) / (BEYOND * of));
  return (
    <>
      <p className="text-small text-ink-2">
        day {day} of {of}
        {over > 0 && <strong className="ml-2 text-differs">{over} {over === 1 ? 'day' : 'days'} over</strong>}
      </p>
      <svg viewBox={`0 0 ${BAR.width} ${BAR.height + 6}`} className="mt-1 block h-3 w-[180px] max-w-full" aria-hidden="true" focusable="false">
        <rect x="0.5" y="3.5" width={BAR.width - 1} height={BAR.height - 1} className="fill-hover stroke-hair-2" />
        <rect x="0" y="3" width={at(day)} height={BAR.height} className={over > 0 ? 'fill-differs' : 'fill-ink-2'} />
        <rect x={at(of) - 0.5} y="0" width="1" height={BAR.height + 6} className="fill-ink" />
      </svg>
    </>
  );
}

function NextStep({ row }: { readonly row: QueueRow }) {
  const of = <span className="sr-only">: {row.title}</span>;
  if (row.next === 'take') return <ActButton act={takeTriage} input={{ id: row.submissionId }} busy="Taking it" tone="main" size="low">Take it{of}</ActButton>;
  if (row.next === 'remind') return <RemindButton submissionId={row.submissionId} title={row.title} />;
  return <LinkButton href={stepHref(row)} size="low" tone={row.next === 'decide' ? 'main' : 'plain'}>{stepWords[row.next]}{of}</LinkButton>;
}

/** One submission: what it is, where it stands, who has the ball and for how long, and the next step. */
export function QueueLine({ row }: { readonly row: QueueRow }) {
  return (
    <StackedRow>
      <HeadCell>
        <Link className="font-serif text-[17px] font-semibold text-ink" href={`/review/${row.submissionId}` as Route}>{row.title || 'Untitled'}</Link>
        <p className="text-small text-ink-2">{row.authors.join(', ')}{row.group && ` · ${row.group}`} · revision {row.revision}</p>
      </HeadCell>
      <Cell>
        <VerdictStrip verdicts={row.verdicts.map((verdict, i) => ({ id: `C${i + 1}`, verdict }))} />
        <p className="text-small text-ink-2">{row.stateWords}</p>
      </Cell>
      <Cell>
        <p className="font-semibold">{row.ball.you ? 'You' : row.ball.with}</p>
        <p className="text-small text-ink-2">{row.because}</p>
        <Days {...row.ball} />
      </Cell>
      <Cell last><NextStep row={row} /></Cell>
    </StackedRow>
  );
}
