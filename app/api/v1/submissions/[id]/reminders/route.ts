import { remind } from '@/lib/http/contract/reviews';
import { defineRoute } from '@/lib/http/define-route';
import { remind as remindAll } from '@/lib/services/reviews/remind';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({ ...remind, handle: ({ actor, params }) => remindAll(actor, params.id) });
