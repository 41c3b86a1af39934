import { defineRoute, idParam } from '@/lib/http/define-route';
import { replyToThread } from '@/lib/services/reviews/reply-to-thread';
import { replyInput } from '@/lib/services/reviews/review-inputs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({
  door: 'POST /api/v1/threads/{id}/comments',
  params: idParam,
  body: replyInput,
  status: 201,
  handle: ({ actor, params, body }) => replyToThread(actor, params.id, body),
});
