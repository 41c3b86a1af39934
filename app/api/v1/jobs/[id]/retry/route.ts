import { retryJob } from '@/lib/http/contract/records';
import { defineRoute } from '@/lib/http/define-route';
import { retryJob as retry } from '@/lib/services/jobs/failed-jobs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({ ...retryJob, handle: ({ actor, params }) => retry(actor, params.id) });
