import { defineRoute, idParam } from '@/lib/http/define-route';
import { remind } from '@/lib/services/reviews/remind';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/reminders',
  params: idParam,
  handle: ({ actor, params }) => remind(actor, params.id),
});
