import { defineRoute, idParam } from '@/lib/http/define-route';
import { getDesk } from '@/lib/services/reviews/get-desk';
import { openThread } from '@/lib/services/reviews/open-thread';
import { threadInput } from '@/lib/services/reviews/review-inputs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({
  door: 'GET /api/v1/submissions/{id}/threads',
  params: idParam,
  handle: async ({ actor, params }) => {
    const desk = await getDesk(actor, params.id);
    return desk.ok ? { ok: true as const, value: { threads: desk.value.threads } } : desk;
  },
});

export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/threads',
  params: idParam,
  body: threadInput,
  status: 201,
  handle: ({ actor, params, body }) => openThread(actor, params.id, body),
});
