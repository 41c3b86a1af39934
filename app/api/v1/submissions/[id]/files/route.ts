import { z } from 'zod';
import { defineRoute, idParam } from '@/lib/http/define-route';
import { uploadFiles } from '@/lib/http/upload-files';
import { removeFile } from '@/lib/services/files/remove-file';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** Multipart, streamed to the store while it is hashed. */
export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/files',
  params: idParam,
  body: 'stream',
  status: 201,
  handle: ({ actor, params, request, parts }) => uploadFiles(actor, params.id, request, parts),
});

export const DELETE = defineRoute({
  door: 'DELETE /api/v1/submissions/{id}/files',
  params: idParam,
  body: z.strictObject({ name: z.string().min(1).max(300) }),
  handle: ({ actor, params, body }) => removeFile(actor, params.id, body),
});
