import { defineRoute, idParam } from '@/lib/http/define-route';
import { retryJob } from '@/lib/services/jobs/failed-jobs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({ door: 'POST /api/v1/jobs/{id}/retry', params: idParam, status: 202, handle: ({ actor, params }) => retryJob(actor, params.id) });
