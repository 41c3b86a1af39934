import { servePart } from '../../../../(public)/records/serve-part';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** The signed bytes; `/records/{id}` is the page for people. */
export const GET = servePart('GET /api/v1/records/{id}', 'record');
