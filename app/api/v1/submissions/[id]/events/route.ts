import { defineRoute, idParam } from '@/lib/http/define-route';
import { progressStream } from '@/lib/http/event-stream';
import { watchProgress } from '@/lib/services/runs/watch-progress';
import { ok } from '@/lib/kernel/result';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** Server-sent; open only while something runs. */
export const GET = defineRoute({
  door: 'GET /api/v1/submissions/{id}/events',
  params: idParam,
  handle: async ({ actor, params, request }) => {
    const watch = await watchProgress(actor, params.id);
    return watch.ok ? ok(await progressStream(watch.value, request.signal)) : watch;
  },
  respond: (stream) => stream,
});
