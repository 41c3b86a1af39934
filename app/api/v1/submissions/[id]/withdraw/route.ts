import { z } from 'zod';
import { defineRoute, idParam } from '@/lib/http/define-route';
import { withdrawSubmission } from '@/lib/services/submissions/withdraw-submission';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/withdraw',
  params: idParam,
  body: z.strictObject({ reason: z.string().max(2000) }),
  handle: ({ actor, params, body }) => withdrawSubmission(actor, params.id, body),
});
