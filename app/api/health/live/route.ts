/** `/healthz`: the process answers. Says nothing about what stands behind it. */
export function GET(): Response {
  return Response.json({ live: true }, { headers: { 'cache-control': 'no-store' } });
}
