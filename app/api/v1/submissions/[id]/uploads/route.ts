import { beginUpload } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { beginUpload as begin } from '@/lib/services/files/begin-upload';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** A long file is announced, then sent part by part, then finished; see `UploadView`. */
export const POST = defineRoute({ ...beginUpload, handle: ({ actor, params, body }) => begin(actor, params.id, body) });
