import { defineRoute, idParam } from '@/lib/http/define-route';
import { decide } from '@/lib/services/decisions/decide';
import { draftDecision } from '@/lib/services/decisions/draft-decision';
import { decisionInput } from '@/lib/services/reviews/review-inputs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** What the decision page starts from. */
export const GET = defineRoute({
  door: 'GET /api/v1/submissions/{id}/decisions',
  params: idParam,
  handle: ({ actor, params }) => draftDecision(actor, params.id),
});

export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/decisions',
  params: idParam,
  body: decisionInput,
  status: 201,
  handle: ({ actor, params, body }) => decide(actor, params.id, body),
});
