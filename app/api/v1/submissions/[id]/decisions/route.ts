import { decide, draftDecision } from '@/lib/http/contract/reviews';
import { defineRoute } from '@/lib/http/define-route';
import { decide as decideOn } from '@/lib/services/decisions/decide';
import { draftDecision as draft } from '@/lib/services/decisions/draft-decision';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ ...draftDecision, handle: ({ actor, params }) => draft(actor, params.id) });

export const POST = defineRoute({ ...decide, handle: ({ actor, params, body }) => decideOn(actor, params.id, body) });
