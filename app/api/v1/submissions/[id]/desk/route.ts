import { defineRoute, idParam } from '@/lib/http/define-route';
import { getDesk } from '@/lib/services/reviews/get-desk';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({
  door: 'GET /api/v1/submissions/{id}/desk',
  params: idParam,
  handle: ({ actor, params }) => getDesk(actor, params.id),
});
