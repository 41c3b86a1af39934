import { asAttachment } from '@/lib/http/attachment';
import { defineRoute, idParam } from '@/lib/http/define-route';
import { exportSheet } from '@/lib/services/submissions/export-sheet';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({
  door: 'GET /api/v1/submissions/{id}/sheet',
  params: idParam,
  handle: ({ actor, params }) => exportSheet(actor, params.id),
  respond: ({ text }) => asAttachment('claim.json', text, { 'content-type': 'application/json; charset=utf-8' }),
});
