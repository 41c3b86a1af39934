import { answerFinding } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { answerFinding as answer } from '@/lib/services/submissions/answer-finding';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const PUT = defineRoute({ ...answerFinding, handle: ({ actor, params, body }) => answer(actor, params.id, body) });
