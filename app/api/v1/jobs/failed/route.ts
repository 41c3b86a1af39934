import { defineRoute } from '@/lib/http/define-route';
import { listFailedJobs } from '@/lib/services/jobs/failed-jobs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ door: 'GET /api/v1/jobs/failed', handle: ({ actor }) => listFailedJobs(actor) });
