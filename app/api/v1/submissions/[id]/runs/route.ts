import { defineRoute, idParam } from '@/lib/http/define-route';
import { listRuns } from '@/lib/services/runs/list-runs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ door: 'GET /api/v1/submissions/{id}/runs', params: idParam, handle: ({ actor, params }) => listRuns(actor, params.id) });
