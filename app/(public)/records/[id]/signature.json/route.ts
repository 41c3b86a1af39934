import { servePart } from '../../serve-part';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = servePart('GET /records/{id}/signature.json', 'signature');
