import { createSubmission, listSubmissions } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { uploadFolder } from '@/lib/http/upload-files';
import { pageOwnSubmissions } from '@/lib/services/submissions/list-own-submissions';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ ...listSubmissions, handle: ({ actor, query }) => pageOwnSubmissions(actor, query) });

/** Multipart: `claim` and its files, or one archive. */
export const POST = defineRoute({
  ...createSubmission,
  handle: ({ actor, request, parts }) => uploadFolder(actor, request, parts),
  headers: ({ id }) => ({ location: `/api/v1/submissions/${id}` }),
});
