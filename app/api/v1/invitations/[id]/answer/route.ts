import { defineRoute, idParam } from '@/lib/http/define-route';
import { answerInvitation } from '@/lib/services/reviews/answer-invitation';
import { invitationAnswerInput } from '@/lib/services/reviews/review-inputs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({
  door: 'POST /api/v1/invitations/{id}/answer',
  params: idParam,
  body: invitationAnswerInput,
  handle: ({ actor, params, body }) => answerInvitation(actor, params.id, body),
});
