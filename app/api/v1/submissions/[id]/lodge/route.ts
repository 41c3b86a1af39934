import { lodgeSubmission } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { lodgeSubmission as lodge } from '@/lib/services/submissions/lodge-submission';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({ ...lodgeSubmission, handle: ({ actor, params, ifMatch }) => lodge(actor, params.id, ifMatch) });
