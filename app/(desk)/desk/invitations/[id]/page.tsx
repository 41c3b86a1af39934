import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { Facts } from '@/app/_ui/primitives/facts';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { formatDay } from '@/app/views/dates';
import { quantityWords } from '@/app/views/quantity-word';
import { loadFor } from '@/lib/http/page-guard';
import { listOwnInvitations } from '@/lib/services/reviews/list-own-invitations';
import { AnswerForm } from './answer-form';

export const metadata: Metadata = { title: 'Invitation' };

export default async function Invitation({ params }: { readonly params: Promise<{ readonly id: string }> }) {
  const { id } = await params;
  const invitation = (await loadFor(`/desk/invitations/${id}`, listOwnInvitations)).find((i) => i.id === id);
  if (!invitation) notFound();
  return (
    <div className="wrap pt-10">
      <div className="mx-auto grid max-w-[720px] gap-6">
        <p className="text-ui text-ink-2">You are asked to referee</p>
        <h1>{invitation.title}</h1>
        <Facts facts={[['Authors', invitation.authors.join(', ')], ['Quantities', quantityWords(invitation.quantities) || 'not computed yet'], ['Editor', invitation.editor], ['Asked', formatDay(invitation.invitedAt)], ['Answer by', formatDay(invitation.answerBy)]]} />
        {invitation.state === 'asked' ? (
          <AnswerForm id={invitation.id} />
        ) : (
          <p>You accepted this invitation. <LinkButton href={`/review/${invitation.submissionId}`}>Open the desk</LinkButton></p>
        )}
      </div>
    </div>
  );
}
