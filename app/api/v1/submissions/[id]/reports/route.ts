import { defineRoute, idParam } from '@/lib/http/define-route';
import { handInReport } from '@/lib/services/reviews/hand-in-report';
import { reportInput } from '@/lib/services/reviews/review-inputs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/reports',
  params: idParam,
  body: reportInput,
  status: 201,
  handle: ({ actor, params, body }) => handInReport(actor, params.id, body),
});
