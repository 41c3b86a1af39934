import { defineRoute, idParam } from '@/lib/http/define-route';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/lodge',
  params: idParam,
  status: 202,
  handle: ({ actor, params }) => lodgeSubmission(actor, params.id),
});
