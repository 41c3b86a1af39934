import { readFigures } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { getFigures } from '@/lib/services/runs/list-runs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ ...readFigures, handle: ({ actor, params, query }) => getFigures(actor, params.id, query.run) });
