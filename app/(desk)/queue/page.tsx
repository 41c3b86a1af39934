import type { Metadata } from 'next';
import Link from 'next/link';
import type { Route } from 'next';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { EmptyState } from '@/app/_ui/primitives/page-state';
import { Table } from '@/app/_ui/primitives/table';
import { VerdictStrip } from '@/app/_ui/verdict/verdict-chip';
import { loadFor } from '@/lib/http/page-guard';
import { QUEUE_GROUP_WORDS, type QueueStep } from '@/lib/reviews/queue';
import { getQueue } from '@/lib/services/reviews/get-queue';
import type { QueueRow, QueueView } from '@/lib/services/reviews/queue-view';
import { ActButton } from '../act-parts';
import { takeTriage } from '../review/actions';

export const metadata: Metadata = { title: 'Queue' };

const stepWords: Record<Exclude<QueueStep, 'take'>, string> = {
  assign: 'Choose referees',
  'send-to-review': 'Send to review',
  remind: 'See who is silent',
  decide: 'Decide',
  look: 'Look at the run',
  open: 'Open',
};

const stepHref = (row: QueueRow): string => (row.next === 'decide' ? `/review/${row.submissionId}/decide` : `/review/${row.submissionId}`);

/** `day 25 of 21` says it is late; so does the word, for colour alone says nothing. */
function Days({ day, of }: QueueRow['ball']) {
  const over = of === null ? 0 : day - of;
  return (
    <span className="whitespace-nowrap text-small text-ink-2">
      day {day}{of !== null && ` of ${of}`}
      {over > 0 && <strong className="ml-2 text-differs">{over} {over === 1 ? 'day' : 'days'} over</strong>}
    </span>
  );
}

function Row({ row }: { readonly row: QueueRow }) {
  return (
    <tr>
      <th scope="row" className="max-w-[46ch]">
        <Link href={`/review/${row.submissionId}` as Route}>{row.title || 'Untitled'}</Link>
        <p className="text-small font-normal text-ink-2">{row.authors.join(', ')}{row.group && ` · ${row.group}`} · revision {row.revision}</p>
      </th>
      <td>{row.stateWords}</td>
      <td><VerdictStrip verdicts={row.verdicts.map((verdict, i) => ({ id: `C${i + 1}`, verdict }))} /></td>
      <td>
        <p className="font-semibold">{row.ball.you ? 'you' : row.ball.with}</p>
        <Days {...row.ball} />
      </td>
      <td>{row.because}</td>
      <td className="text-right">
        {row.next === 'take' ? <ActButton act={takeTriage} input={{ id: row.submissionId }} busy="Taking it" tone="main" size="low">Take it</ActButton> : <LinkButton href={stepHref(row)} size="low" tone={row.next === 'open' ? 'quiet' : 'plain'}>{stepWords[row.next]}</LinkButton>}
      </td>
    </tr>
  );
}

function Group({ group, rows }: QueueView['groups'][number]) {
  return (
    <section aria-labelledby={`g-${group}`}>
      <h2 id={`g-${group}`} className="mb-2">{QUEUE_GROUP_WORDS[group]} <span className="text-ink-2">{rows.length}</span></h2>
      <Table caption={`${QUEUE_GROUP_WORDS[group]}: ${rows.length} ${rows.length === 1 ? 'submission' : 'submissions'}`}>
        <thead>
          <tr><th scope="col">Submission</th><th scope="col">State</th><th scope="col">Verdicts</th><th scope="col">Has the ball</th><th scope="col">Why here</th><th scope="col"><span className="sr-only">Next step</span></th></tr>
        </thead>
        <tbody>{rows.map((row) => <Row key={row.submissionId} row={row} />)}</tbody>
      </Table>
    </section>
  );
}

export default async function Queue() {
  const queue = await loadFor('/queue', (actor) => getQueue(actor));
  return (
    <div className="wrap grid gap-10 pt-10">
      <div>
        <h1>Queue</h1>
        <p className="mt-1 text-ink-2">{queue.needYou} of {queue.total} need something now. The rest wait for somebody else.</p>
      </div>
      {queue.groups.map((g) => <Group key={g.group} {...g} />)}
      {queue.total === 0 && <EmptyState title="Nothing is under review">A submission comes here when its authors lodge it and the server has recomputed its claims.</EmptyState>}
    </div>
  );
}
