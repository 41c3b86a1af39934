import { askVariation, listVariations } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { pageWithReadings } from '@/lib/services/variations/list-variations';
import { requestVariation } from '@/lib/services/variations/request-variation';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ ...listVariations, handle: ({ actor, params, query }) => pageWithReadings(actor, params.id, query) });

export const POST = defineRoute({ ...askVariation, handle: ({ actor, params, body }) => requestVariation(actor, params.id, body) });
