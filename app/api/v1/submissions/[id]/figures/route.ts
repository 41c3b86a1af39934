import { z } from 'zod';
import { defineRoute, idParam } from '@/lib/http/define-route';
import { getFigures } from '@/lib/services/runs/list-runs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({
  door: 'GET /api/v1/submissions/{id}/figures',
  params: idParam,
  query: z.strictObject({ run: z.string() }),
  handle: ({ actor, params, query }) => getFigures(actor, params.id, query.run),
});
