import { defineRoute, idParam } from '@/lib/http/define-route';
import { answerFinding, findingAnswer } from '@/lib/services/submissions/answer-finding';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const PUT = defineRoute({
  door: 'PUT /api/v1/submissions/{id}/answers',
  params: idParam,
  body: findingAnswer,
  handle: ({ actor, params, body }) => answerFinding(actor, params.id, body),
});
