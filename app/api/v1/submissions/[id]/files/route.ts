import { addFiles, removeFile } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { uploadFiles } from '@/lib/http/upload-files';
import { removeFile as remove } from '@/lib/services/files/remove-file';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** Multipart, streamed to the store while it is hashed. */
export const POST = defineRoute({ ...addFiles, handle: ({ actor, params, request, parts }) => uploadFiles(actor, params.id, request, parts) });

export const DELETE = defineRoute({ ...removeFile, handle: ({ actor, params, body, ifMatch }) => remove(actor, params.id, body, ifMatch) });
