import { finishUpload, letGoOfUpload } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { finishUpload as finish, letGoOfUpload as letGo } from '@/lib/services/files/finish-upload';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** All parts are there: the file takes its place in the draft. */
export const POST = defineRoute({ ...finishUpload, handle: ({ actor, params }) => finish(actor, params.id, params.uploadId) });

export const DELETE = defineRoute({ ...letGoOfUpload, handle: ({ actor, params }) => letGo(actor, params.id, params.uploadId) });
