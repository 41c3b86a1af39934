import { defineRoute, idParam } from '@/lib/http/define-route';
import { noteToEditor } from '@/lib/services/reviews/note-to-editor';
import { noteInput } from '@/lib/services/reviews/review-inputs';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({
  door: 'POST /api/v1/submissions/{id}/notes',
  params: idParam,
  body: noteInput,
  status: 201,
  handle: ({ actor, params, body }) => noteToEditor(actor, params.id, body.body),
});
