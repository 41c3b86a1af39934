import type { Metadata } from 'next';
import { EmptyState } from '@/app/_ui/primitives/page-state';
import { loadFor } from '@/lib/http/page-guard';
import { QUEUE_GROUP_WORDS, type QueueGroup } from '@/lib/reviews/queue';
import { getQueue } from '@/lib/services/reviews/get-queue';
import type { QueueView } from '@/lib/services/reviews/queue-view';
import { StackedTable } from '../stacked-table';
import { QueueLine } from './queue-line';

export const metadata: Metadata = { title: 'Queue' };

const groupReason: Record<QueueGroup, string> = {
  assign: 'an editor or referees wanted',
  chase: 'a clock has run out or soon will',
  decide: 'all reports are in',
  'unsettled-runs': 'the machine asks',
  waiting: 'waiting on others',
};

const COLUMNS = [
  { title: 'Submission' },
  { title: 'Claims and state', width: 'lg:w-[190px]' },
  { title: 'Who has the ball', width: 'lg:w-[230px]' },
  { title: 'Next step', width: 'lg:w-[180px]', hidden: true },
];

function Group({ group, rows }: QueueView['groups'][number]) {
  return (
    <section aria-labelledby={`g-${group}`}>
      <h2 id={`g-${group}`} className="mb-2">{QUEUE_GROUP_WORDS[group]} <span className="font-sans text-ui font-normal text-ink-2">{groupReason[group]}</span></h2>
      <StackedTable caption={`${QUEUE_GROUP_WORDS[group]}: ${rows.length} ${rows.length === 1 ? 'submission' : 'submissions'}`} columns={COLUMNS}>
        {rows.map((row) => <QueueLine key={row.submissionId} row={row} />)}
      </StackedTable>
    </section>
  );
}

/** `5 submissions. 2 need you, 3 wait for others.` */
function inWords({ total, needYou }: QueueView): string {
  const waiting = total - needYou;
  return `${total} ${total === 1 ? 'submission' : 'submissions'}. ${needYou} ${needYou === 1 ? 'needs' : 'need'} an editor, ${waiting} ${waiting === 1 ? 'waits' : 'wait'} for others.`;
}

export default async function Queue() {
  const queue = await loadFor('/queue', (actor) => getQueue(actor));
  return (
    <div className="wrap grid gap-10 pt-10">
      <div>
        <h1>Queue</h1>
        <p className="mt-1 text-ink-2">{inWords(queue)}</p>
      </div>
      {queue.groups.map((g) => <Group key={g.group} {...g} />)}
      {queue.total === 0 && <EmptyState title="Nothing is under review">A submission comes here when its authors lodge it and the server has recomputed its claims.</EmptyState>}
    </div>
  );
}
