import { httpDate, isUnchangedFor } from '@/lib/http/not-modified';
import type { RegisterExport } from '@/lib/services/records/export-register';

/** A repeated name keeps all its values, so that the second is not dropped in silence. */
export function addressParamsOf(url: string): Readonly<Record<string, string[]>> {
  const params = new URL(url).searchParams;
  return Object.fromEntries([...new Set(params.keys())].map((name) => [name, params.getAll(name)]));
}

interface Body {
  readonly type: string;
  readonly disposition: string;
  readonly parts: () => AsyncGenerator<string>;
}

/** Written only when the asker holds another state; to everybody alike, so any cache may keep it. */
export function exportResponse(data: RegisterExport, request: Request, { type, disposition, parts }: Body): Response {
  const etag = `"${data.digest}"`;
  const headers = new Headers({
    etag,
    'last-modified': httpDate(data.changedAt),
    'cache-control': 'public, no-cache',
    'content-security-policy': "default-src 'none'; frame-ancestors 'none'; sandbox",
    'x-content-type-options': 'nosniff',
    'access-control-allow-origin': '*',
    'cross-origin-resource-policy': 'cross-origin',
  });
  if (isUnchangedFor(request.headers, etag, data.changedAt)) return new Response(null, { status: 304, headers });
  headers.set('content-type', type);
  headers.set('content-disposition', disposition);
  return new Response(request.method === 'HEAD' ? null : streamOf(parts()), { headers });
}

function streamOf(parts: AsyncGenerator<string>): ReadableStream<Uint8Array> {
  const encoder = new TextEncoder();
  return new ReadableStream({
    async pull(controller) {
      const { done, value } = await parts.next();
      if (done) controller.close();
      else controller.enqueue(encoder.encode(value));
    },
    async cancel() {
      await parts.return(undefined);
    },
  });
}
