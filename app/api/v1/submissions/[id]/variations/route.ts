import { defineRoute, idParam } from '@/lib/http/define-route';
import { listVariations } from '@/lib/services/variations/list-variations';
import { requestVariation, variationInput } from '@/lib/services/variations/request-variation';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ door: 'GET /api/v1/submissions/{id}/variations', params: idParam, handle: ({ actor, params }) => listVariations(actor, params.id) });

export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/variations',
  params: idParam,
  body: variationInput,
  status: 202,
  handle: ({ actor, params, body }) => requestVariation(actor, params.id, body),
});
