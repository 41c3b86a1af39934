import { reviseSubmission } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { reviseSubmission as revise } from '@/lib/services/submissions/revise-submission';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({ ...reviseSubmission, handle: ({ actor, params }) => revise(actor, params.id) });
