import { Readable } from 'node:stream';
import { z } from 'zod';
import { defineRoute } from '@/lib/http/define-route';
import { fail } from '@/lib/services/app-error';
import { takePart } from '@/lib/services/files/take-part';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** The bytes of one part as they are, streamed to the store. The same part again takes the place of the first. */
export const PUT = defineRoute({
  door: 'PUT /api/v1/submissions/{id}/uploads/{uploadId}/parts/{number}',
  params: z.strictObject({ id: z.uuid({ version: 'v4' }), uploadId: z.uuid({ version: 'v4' }), number: z.coerce.number().int().min(0).max(999) }),
  body: 'stream',
  rate: { points: 600, perS: 60 },
  handle: async ({ actor, params, request }) =>
    request.body ? takePart(actor, params.id, params, Readable.fromWeb(request.body as Parameters<typeof Readable.fromWeb>[0])) : fail('invalid', 'The request has no body; expected the bytes of one part.'),
});
