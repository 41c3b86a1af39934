import { z } from 'zod';
import { defineRoute } from '@/lib/http/define-route';
import { finishUpload, letGoOfUpload } from '@/lib/services/files/finish-upload';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

const uploadParam = z.strictObject({ id: z.uuid({ version: 'v4' }), uploadId: z.uuid({ version: 'v4' }) });

/** All parts are there: the file takes its place in the draft. */
export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/uploads/{uploadId}',
  params: uploadParam,
  status: 201,
  handle: ({ actor, params }) => finishUpload(actor, params.id, params.uploadId),
});

export const DELETE = defineRoute({
  door: 'DELETE /api/v1/submissions/{id}/uploads/{uploadId}',
  params: uploadParam,
  handle: ({ actor, params }) => letGoOfUpload(actor, params.id, params.uploadId),
});
