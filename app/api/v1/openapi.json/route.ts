import { readOpenApi } from '@/lib/http/contract/records';
import { defineRoute } from '@/lib/http/define-route';
import { openApiDocument } from '@/lib/http/openapi-document';
import { ok } from '@/lib/kernel/result';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** The contract for machines; `/interface` is the page for people. */
export const GET = defineRoute({ ...readOpenApi, handle: () => Promise.resolve(ok(openApiDocument())) });
