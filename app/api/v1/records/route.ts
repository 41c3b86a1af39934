import { z } from 'zod';
import { defineRoute } from '@/lib/http/define-route';
import { listRecords } from '@/lib/services/records/list-records';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

const word = z.string().max(200).optional();

export const GET = defineRoute({
  door: 'GET /api/v1/records',
  query: z.strictObject({ text: word, quantity: word, verdict: word }),
  handle: ({ actor, query }) => listRecords(actor, query),
});
