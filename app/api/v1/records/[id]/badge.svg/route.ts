import { servePart } from '../../../../../(public)/records/serve-part';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = servePart('GET /api/v1/records/{id}/badge.svg', 'badge');
