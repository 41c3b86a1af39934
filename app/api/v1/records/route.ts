import { listRecords } from '@/lib/http/contract/records';
import { defineRoute } from '@/lib/http/define-route';
import { pageRecords } from '@/lib/services/records/list-records';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ ...listRecords, handle: ({ actor, query: { limit, cursor, ...asked } }) => pageRecords(actor, { limit, cursor }, asked) });
