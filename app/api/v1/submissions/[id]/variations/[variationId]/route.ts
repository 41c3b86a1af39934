import { readVariation } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { getVariationOf } from '@/lib/services/variations/get-variation';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ ...readVariation, handle: ({ actor, params }) => getVariationOf(actor, params.id, params.variationId) });
