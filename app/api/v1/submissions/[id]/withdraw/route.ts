import { withdrawSubmission } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { withdrawSubmission as withdraw } from '@/lib/services/submissions/withdraw-submission';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({ ...withdrawSubmission, handle: ({ actor, params, body }) => withdraw(actor, params.id, body) });
