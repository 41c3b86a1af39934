import { closeThread } from '@/lib/http/contract/reviews';
import { defineRoute } from '@/lib/http/define-route';
import { closeThread as close } from '@/lib/services/reviews/close-thread';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({ ...closeThread, handle: ({ actor, params, body }) => close(actor, params.id, body.closing) });
