import { defineRoute } from '@/lib/http/define-route';
import { getQueue } from '@/lib/services/reviews/get-queue';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ door: 'GET /api/v1/queue', handle: ({ actor }) => getQueue(actor) });
