import { Readable } from 'node:stream';

/** Bytes to keep, not to show: no type is guessed and no script in them ever runs here. */
export function asAttachment(name: string, body: string | Readable, headers: Readonly<Record<string, string>>): Response {
  const last = name.split('/').at(-1) ?? 'file';
  const plain = last.replace(/[^\x20-\x7e]|["\\%]/g, '_');
  const stream = typeof body === 'string' ? body : (Readable.toWeb(body) as ReadableStream<Uint8Array>);
  return new Response(stream, {
    headers: {
      'cache-control': 'private, no-store',
      'x-content-type-options': 'nosniff',
      'content-security-policy': "default-src 'none'; sandbox",
      'content-disposition': `attachment; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(last)}`,
      ...headers,
    },
  });
}
