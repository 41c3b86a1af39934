import { defineRoute, idParam } from '@/lib/http/define-route';
import { closeThread } from '@/lib/services/reviews/close-thread';
import { closingInput } from '@/lib/services/reviews/review-inputs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({
  door: 'POST /api/v1/threads/{id}/close',
  params: idParam,
  body: closingInput,
  handle: ({ actor, params, body }) => closeThread(actor, params.id, body.closing),
});
