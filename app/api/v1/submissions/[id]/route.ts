import { defineRoute, idParam } from '@/lib/http/define-route';
import { getSubmission } from '@/lib/services/submissions/get-submission';
import { draftChange, updateDraft } from '@/lib/services/submissions/update-draft';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ door: 'GET /api/v1/submissions/{id}', params: idParam, handle: ({ actor, params }) => getSubmission(actor, params.id) });

export const PATCH = defineRoute({
  door: 'PATCH /api/v1/submissions/{id}',
  params: idParam,
  body: draftChange,
  handle: ({ actor, params, body }) => updateDraft(actor, params.id, body),
});
