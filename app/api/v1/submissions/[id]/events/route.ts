import { watchRuns } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { progressStream } from '@/lib/http/event-stream';
import { ok } from '@/lib/kernel/result';
import { watchProgress } from '@/lib/services/runs/watch-progress';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** Server-sent; open only while something runs. */
export const GET = defineRoute({
  ...watchRuns,
  handle: async ({ actor, params, request }) => {
    const watch = await watchProgress(actor, params.id);
    return watch.ok ? ok(await progressStream(watch.value, request.signal)) : watch;
  },
  respond: (stream) => stream,
});
