import { Readable } from 'node:stream';
import { sendPart } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { fail } from '@/lib/services/app-error';
import { takePart } from '@/lib/services/files/take-part';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** The bytes of one part as they are, streamed to the store. */
export const PUT = defineRoute({
  ...sendPart,
  handle: async ({ actor, params, request }) =>
    request.body ? takePart(actor, params.id, params, Readable.fromWeb(request.body as Parameters<typeof Readable.fromWeb>[0])) : fail('invalid', 'The request has no body; expected the bytes of one part.'),
});
