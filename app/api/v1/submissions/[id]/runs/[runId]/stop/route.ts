import { stopRun as contract } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { stopRun } from '@/lib/services/runs/stop-run';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({ ...contract, handle: ({ actor, params }) => stopRun(actor, params.id, params.runId) });
