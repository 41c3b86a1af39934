import { z } from 'zod';
import { defineRoute } from '@/lib/http/define-route';
import { holdsAlready } from '@/lib/http/json-answer';
import { err, ok } from '@/lib/kernel/result';
import { NOT_FOUND } from '@/lib/services/app-error';
import { findPublishedSchema } from './published-schemas';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** The open formats, for whoever writes or reads them with a program. */
export const GET = defineRoute({
  door: 'GET /schemas/{format}/{version}',
  params: z.strictObject({ format: z.string().max(40), version: z.string().max(4) }),
  handle: ({ params, request }) => {
    const found = findPublishedSchema(`${params.format}/${params.version}`);
    return Promise.resolve(found ? ok({ ...found, request }) : err(NOT_FOUND));
  },
  respond: ({ text, etag, request }) => {
    const headers = new Headers({ 'content-type': 'application/schema+json; charset=utf-8', etag, 'cache-control': 'public, max-age=300, must-revalidate', 'access-control-allow-origin': '*', 'cross-origin-resource-policy': 'cross-origin' });
    return holdsAlready(request.headers.get('if-none-match'), etag) ? new Response(null, { status: 304, headers }) : new Response(text, { headers });
  },
});
