import { editSubmission, readSubmission } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { VERSION_WANTED } from '@/lib/http/problem-response';
import { err } from '@/lib/kernel/result';
import { getSubmission } from '@/lib/services/submissions/get-submission';
import { tagOf } from '@/lib/services/submissions/submission-tag';
import { updateDraft } from '@/lib/services/submissions/update-draft';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ ...readSubmission, handle: ({ actor, params }) => getSubmission(actor, params.id), tag: tagOf });

/** The edit names the version it was made on, so that nobody's is lost under another's. */
export const PATCH = defineRoute({
  ...editSubmission,
  handle: async ({ actor, params, body, ifMatch }) => (ifMatch === null && body.version === undefined ? err(VERSION_WANTED) : updateDraft(actor, params.id, body, ifMatch)),
});
