import { defineRoute, idParam } from '@/lib/http/define-route';
import { checkDraft } from '@/lib/services/submissions/check-draft';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/check',
  params: idParam,
  status: 202,
  handle: ({ actor, params }) => checkDraft(actor, params.id),
});
