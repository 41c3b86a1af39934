import { openVariation } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { openByLink } from '@/lib/services/variations/open-by-link';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const PUT = defineRoute({ ...openVariation, handle: ({ actor, params, body }) => openByLink(actor, params.id, params.variationId, body) });
