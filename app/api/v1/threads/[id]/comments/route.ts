import { reply } from '@/lib/http/contract/reviews';
import { defineRoute } from '@/lib/http/define-route';
import { replyToThread } from '@/lib/services/reviews/reply-to-thread';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({ ...reply, handle: ({ actor, params, body }) => replyToThread(actor, params.id, body) });
