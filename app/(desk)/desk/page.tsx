import type { Metadata } from 'next';
import Link from 'next/link';
import type { Route } from 'next';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { EmptyState } from '@/app/_ui/primitives/page-state';
import { formatDay } from '@/app/views/dates';
import { quantityWords } from '@/app/views/quantity-word';
import { loadFor } from '@/lib/http/page-guard';
import { listOwnInvitations } from '@/lib/services/reviews/list-own-invitations';
import type { OwnInvitationView } from '@/lib/services/reviews/invitation-view';
import { Cell, HeadCell, StackedRow, StackedTable } from '../stacked-table';

export const metadata: Metadata = { title: 'Desk' };

const titleLook = 'font-serif text-[17px] font-semibold text-ink';

function Asked({ invitation }: { readonly invitation: OwnInvitationView }) {
  return (
    <StackedRow>
      <HeadCell><Link className={titleLook} href={`/desk/invitations/${invitation.id}` as Route}>{invitation.title}</Link><p className="text-small text-ink-2">{invitation.authors.join(', ')}</p></HeadCell>
      <Cell>{quantityWords(invitation.quantities) || 'not computed yet'}</Cell>
      <Cell>by {formatDay(invitation.answerBy)}</Cell>
      <Cell last><LinkButton href={`/desk/invitations/${invitation.id}`} size="low" tone="main">Answer<span className="sr-only">: {invitation.title}</span></LinkButton></Cell>
    </StackedRow>
  );
}

function Reviewing({ invitation }: { readonly invitation: OwnInvitationView }) {
  return (
    <StackedRow>
      <HeadCell><Link className={titleLook} href={`/review/${invitation.submissionId}` as Route}>{invitation.title}</Link><p className="text-small text-ink-2">{invitation.authors.join(', ')}</p></HeadCell>
      <Cell>{quantityWords(invitation.quantities) || 'not computed yet'}</Cell>
      <Cell>{invitation.stateWords}</Cell>
      <Cell last><LinkButton href={`/review/${invitation.submissionId}`} size="low">Open<span className="sr-only">: {invitation.title}</span></LinkButton></Cell>
    </StackedRow>
  );
}

interface ListProps {
  readonly id: string;
  readonly title: string;
  readonly last: string;
  readonly rows: readonly OwnInvitationView[];
  readonly Row: typeof Asked;
}

function List({ id, title, last, rows, Row }: ListProps) {
  if (rows.length === 0) return null;
  return (
    <section aria-labelledby={id}>
      <h2 id={id} className="mb-2">{title} <span className="font-sans text-ui font-normal text-ink-2">{rows.length}</span></h2>
      <StackedTable caption={title} columns={[{ title: 'Submission' }, { title: 'Quantities', width: 'lg:w-[220px]' }, { title: last, width: 'lg:w-[190px]' }, { title: 'Next step', width: 'lg:w-[120px]', hidden: true }]}>
        {rows.map((row) => <Row key={row.id} invitation={row} />)}
      </StackedTable>
    </section>
  );
}

export default async function Desk() {
  const invitations = await loadFor('/desk', listOwnInvitations);
  return (
    <div className="wrap grid gap-10 pt-10">
      <div>
        <h1>Desk</h1>
        <p className="mt-1 text-ink-2">What you were asked to referee. To authors you are a letter, never a name.</p>
      </div>
      <List id="asked" title="Waiting for your answer" last="Answer" rows={invitations.filter((i) => i.state === 'asked')} Row={Asked} />
      <List id="reviewing" title="You referee" last="State" rows={invitations.filter((i) => i.state === 'accepted')} Row={Reviewing} />
      {invitations.length === 0 && <EmptyState title="Nothing on your desk" actions={<LinkButton href="/submissions">Your own submissions</LinkButton>}>When an editor asks you to referee a submission, it appears here and a letter tells you so.</EmptyState>}
    </div>
  );
}
