import { asAttachment } from '@/lib/http/attachment';
import { readSheet } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { exportSheet } from '@/lib/services/submissions/export-sheet';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({
  ...readSheet,
  handle: ({ actor, params }) => exportSheet(actor, params.id),
  respond: ({ text }) => asAttachment('claim.json', text, { 'content-type': 'application/json; charset=utf-8' }),
});
