import { readQueue } from '@/lib/http/contract/reviews';
import { defineRoute } from '@/lib/http/define-route';
import { getQueue } from '@/lib/services/reviews/get-queue';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ ...readQueue, handle: ({ actor }) => getQueue(actor) });
