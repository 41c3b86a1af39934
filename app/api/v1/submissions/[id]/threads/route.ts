import { listThreads, openThread } from '@/lib/http/contract/reviews';
import { defineRoute } from '@/lib/http/define-route';
import { pageOf } from '@/lib/services/paging';
import { getDesk } from '@/lib/services/reviews/get-desk';
import { openThread as open } from '@/lib/services/reviews/open-thread';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({
  ...listThreads,
  handle: async ({ actor, params, query }) => {
    const desk = await getDesk(actor, params.id);
    return desk.ok ? pageOf(desk.value.threads, query, (thread) => thread.id) : desk;
  },
});

export const POST = defineRoute({ ...openThread, handle: ({ actor, params, body }) => open(actor, params.id, body) });
