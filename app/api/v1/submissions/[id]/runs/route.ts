import { listRuns } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { listRuns as list } from '@/lib/services/runs/list-runs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ ...listRuns, handle: ({ actor, params, query }) => list(actor, params.id, query) });
