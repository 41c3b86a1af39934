import { checkReadiness } from '@/lib/services/health/check-readiness';

/** `/readyz`: 200 when everything that a request needs answers, 503 otherwise. */
export async function GET(): Promise<Response> {
  const readiness = await checkReadiness();
  return Response.json(readiness, { status: readiness.ready ? 200 : 503, headers: { 'cache-control': 'no-store' } });
}
