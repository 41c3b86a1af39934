import { defineRoute } from '@/lib/http/define-route';
import { uploadFolder } from '@/lib/http/upload-files';
import { listOwnSubmissions } from '@/lib/services/submissions/list-own-submissions';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ door: 'GET /api/v1/submissions', handle: ({ actor }) => listOwnSubmissions(actor) });

/** Multipart: `claim` and its files, or one archive. */
export const POST = defineRoute({
  door: 'POST /api/v1/submissions',
  body: 'stream',
  rate: { points: 60, perS: 3600 },
  status: 201,
  handle: ({ actor, request, parts }) => uploadFolder(actor, request, parts),
});
