import { defineRoute, idParam } from '@/lib/http/define-route';
import { inviteReferee } from '@/lib/services/reviews/invite-referee';
import { listRefereeCandidates } from '@/lib/services/reviews/list-referee-candidates';
import { invitationInput } from '@/lib/services/reviews/review-inputs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** Whom the editor might ask. */
export const GET = defineRoute({
  door: 'GET /api/v1/submissions/{id}/invitations',
  params: idParam,
  handle: ({ actor, params }) => listRefereeCandidates(actor, params.id),
});

export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/invitations',
  params: idParam,
  body: invitationInput,
  status: 201,
  handle: ({ actor, params, body }) => inviteReferee(actor, params.id, body),
});
