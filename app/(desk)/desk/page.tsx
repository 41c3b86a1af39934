import type { Metadata } from 'next';
import Link from 'next/link';
import type { Route } from 'next';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { EmptyState } from '@/app/_ui/primitives/page-state';
import { Table } from '@/app/_ui/primitives/table';
import { formatDay } from '@/app/views/dates';
import { loadFor } from '@/lib/http/page-guard';
import { listOwnInvitations } from '@/lib/services/reviews/list-own-invitations';
import type { OwnInvitationView } from '@/lib/services/reviews/invitation-view';

export const metadata: Metadata = { title: 'Desk' };

function Asked({ invitation }: { readonly invitation: OwnInvitationView }) {
  return (
    <tr>
      <th scope="row"><Link href={`/desk/invitations/${invitation.id}` as Route}>{invitation.title}</Link></th>
      <td>{invitation.authors.join(', ')}</td>
      <td>{invitation.quantities.join(', ') || 'not computed yet'}</td>
      <td>by {formatDay(invitation.answerBy)}</td>
      <td className="text-right"><LinkButton href={`/desk/invitations/${invitation.id}`} size="low" tone="main">Answer</LinkButton></td>
    </tr>
  );
}

function Reviewing({ invitation }: { readonly invitation: OwnInvitationView }) {
  return (
    <tr>
      <th scope="row"><Link href={`/review/${invitation.submissionId}` as Route}>{invitation.title}</Link></th>
      <td>{invitation.authors.join(', ')}</td>
      <td>{invitation.quantities.join(', ')}</td>
      <td>{invitation.stateWords}</td>
      <td className="text-right"><LinkButton href={`/review/${invitation.submissionId}`} size="low">Open</LinkButton></td>
    </tr>
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
      <h2 id={id} className="mb-2">{title} <span className="text-ink-2">{rows.length}</span></h2>
      <Table caption={title}>
        <thead><tr><th scope="col">Submission</th><th scope="col">Authors</th><th scope="col">Quantities</th><th scope="col">{last}</th><th scope="col"><span className="sr-only">Next step</span></th></tr></thead>
        <tbody>{rows.map((row) => <Row key={row.id} invitation={row} />)}</tbody>
      </Table>
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
