import { serveAuth } from '@/lib/http/serve-auth';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

/** Doors `GET /api/auth/*` and `POST /api/auth/*`: everything about one's own sign-in. */
export const GET = serveAuth;
export const POST = serveAuth;
