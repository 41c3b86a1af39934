import { listFailedJobs } from '@/lib/http/contract/records';
import { defineRoute } from '@/lib/http/define-route';
import { listFailedJobs as list } from '@/lib/services/jobs/failed-jobs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ ...listFailedJobs, handle: ({ actor }) => list(actor) });
