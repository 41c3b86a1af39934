import { noteToEditor } from '@/lib/http/contract/reviews';
import { defineRoute } from '@/lib/http/define-route';
import { noteToEditor as note } from '@/lib/services/reviews/note-to-editor';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const POST = defineRoute({ ...noteToEditor, handle: ({ actor, params, body }) => note(actor, params.id, body.body) });
