import { checkSubmission } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { checkDraft } from '@/lib/services/submissions/check-draft';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({ ...checkSubmission, handle: ({ actor, params }) => checkDraft(actor, params.id) });
