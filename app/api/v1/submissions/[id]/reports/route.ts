import { handInReport } from '@/lib/http/contract/reviews';
import { defineRoute } from '@/lib/http/define-route';
import { handInReport as handIn } from '@/lib/services/reviews/hand-in-report';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({ ...handInReport, handle: ({ actor, params, body }) => handIn(actor, params.id, body) });
