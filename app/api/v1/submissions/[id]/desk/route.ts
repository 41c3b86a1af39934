import { readDesk } from '@/lib/http/contract/reviews';
import { defineRoute } from '@/lib/http/define-route';
import { getDesk } from '@/lib/services/reviews/get-desk';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ ...readDesk, handle: ({ actor, params }) => getDesk(actor, params.id) });
