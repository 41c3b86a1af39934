import { defineRoute, idParam } from '@/lib/http/define-route';
import { beginUpload } from '@/lib/services/files/begin-upload';
import { announcedFile } from '@/lib/services/files/upload-view';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** A long file is announced, then sent part by part, then finished; see `UploadView`. */
export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/uploads',
  params: idParam,
  body: announcedFile,
  handle: ({ actor, params, body }) => beginUpload(actor, params.id, body),
});
