import { invite, listCandidates } from '@/lib/http/contract/reviews';
import { defineRoute } from '@/lib/http/define-route';
import { inviteReferee } from '@/lib/services/reviews/invite-referee';
import { listRefereeCandidates } from '@/lib/services/reviews/list-referee-candidates';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ ...listCandidates, handle: ({ actor, params }) => listRefereeCandidates(actor, params.id) });

export const POST = defineRoute({ ...invite, handle: ({ actor, params, body }) => inviteReferee(actor, params.id, body) });
