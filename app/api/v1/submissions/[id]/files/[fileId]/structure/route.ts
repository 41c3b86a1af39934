import { readFileStructure } from '@/lib/http/contract/submissions';
import { defineRoute } from '@/lib/http/define-route';
import { getStructure } from '@/lib/services/files/get-structure';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({ ...readFileStructure, handle: ({ actor, params }) => getStructure(actor, params.id, params.fileId) });
