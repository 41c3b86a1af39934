import { asAttachment } from '@/lib/http/attachment';
import { readFile } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { ok } from '@/lib/kernel/result';
import { openFile } from '@/lib/services/files/open-file';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** Its length and digest are not those of the original. */
const ofCopy = (sha256: string): Record<string, string> => ({
  etag: `"${sha256}-referee"`,
  'counterfoil-copy': `for referees; comments that say whose a text file is are blanked; original sha-256 ${sha256}`,
});

/** An uploaded file is only ever given as an attachment, never shown. */
export const GET = defineRoute({
  ...readFile,
  handle: async ({ actor, params }) => {
    const file = await openFile(actor, params.id, params.fileId);
    return file.ok ? ok({ ...file.value, stream: await file.value.open() }) : file;
  },
  respond: ({ name, bytes, sha256, isCopy, stream }) =>
    asAttachment(name, stream, { 'content-type': 'application/octet-stream', ...(isCopy ? ofCopy(sha256) : { 'content-length': String(bytes), etag: `"${sha256}"` }) }),
});
