import { z } from 'zod';
import { defineRoute } from '@/lib/http/define-route';
import { getPublicKey } from '@/lib/services/records/get-record-bytes';
import { publishedResponse } from '../../records/published-response';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** `/keys/{keyId}.pem`: a route segment is a whole, so the ending is part of what is asked. */
export const GET = defineRoute({
  door: 'GET /keys/{file}',
  params: z.strictObject({ file: z.string().regex(/^[0-9a-f]{16}\.pem$/) }),
  handle: async ({ params: { file }, request }) => {
    const found = await getPublicKey(file.slice(0, -'.pem'.length));
    return found.ok ? { ok: true as const, value: publishedResponse(found.value, request) } : found;
  },
  respond: (response) => response,
});
