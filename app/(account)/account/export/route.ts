import { asAttachment } from '@/lib/http/attachment';
import { defineRoute } from '@/lib/http/define-route';
import { exportOwnData } from '@/lib/services/accounts/export-own-data';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({
  door: 'GET /account/export',
  rate: { points: 20, perS: 3600 },
  handle: ({ actor }) => exportOwnData(actor),
  respond: (data) => asAttachment('counterfoil-own-data.json', `${JSON.stringify(data, null, 2)}\n`, { 'content-type': 'application/json; charset=utf-8' }),
});
