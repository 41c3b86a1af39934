import { defineRoute } from '@/lib/http/define-route';
import { exportRegister } from '@/lib/services/records/export-register';
import { FEED_SHAPE, feedOf } from '@/lib/services/records/register-feed';
import { askedOfRegister } from '../asked-of-register';
import { addressParamsOf, exportResponse } from '../export-response';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

async function* whole(text: Promise<string>): AsyncGenerator<string> {
  yield await text;
}

export const GET = defineRoute({
  door: 'GET /register/feed.atom',
  query: askedOfRegister,
  handle: async ({ actor, request }) => {
    const data = await exportRegister(actor, addressParamsOf(request.url), FEED_SHAPE);
    if (!data.ok) return data;
    const body = { type: 'application/atom+xml; charset=utf-8', disposition: 'inline; filename="counterfoil-register.atom"', parts: () => whole(feedOf(data.value)) };
    return { ok: true as const, value: exportResponse(data.value, request, body) };
  },
  respond: (response) => response,
});
