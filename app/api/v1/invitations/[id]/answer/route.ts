import { answerInvitation } from '@/lib/http/contract/reviews';
import { defineRoute } from '@/lib/http/define-route';
import { answerInvitation as answer } from '@/lib/services/reviews/answer-invitation';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({ ...answerInvitation, handle: ({ actor, params, body }) => answer(actor, params.id, body) });
