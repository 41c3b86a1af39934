import { defineRoute, idParam } from '@/lib/http/define-route';
import { reviseSubmission } from '@/lib/services/submissions/revise-submission';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/revise',
  params: idParam,
  status: 201,
  handle: ({ actor, params }) => reviseSubmission(actor, params.id),
});
