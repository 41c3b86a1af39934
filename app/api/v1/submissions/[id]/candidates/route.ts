import { answerCandidate, takeOverCandidate } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { answerCandidate as answer } from '@/lib/services/candidates/answer-candidate';
import { takeOverCandidate as takeOver } from '@/lib/services/candidates/take-over-candidate';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const PUT = defineRoute({ ...answerCandidate, handle: ({ actor, params, body }) => answer(actor, params.id, body) });
export const POST = defineRoute({ ...takeOverCandidate, handle: ({ actor, params, body }) => takeOver(actor, params.id, body) });
