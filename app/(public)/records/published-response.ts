import type { PublishedBytes } from '@/lib/services/records/get-record-bytes';

const CACHE = { forEver: 'public, max-age=31536000, immutable', live: 'public, max-age=300, must-revalidate' } as const;

/** Stored bytes as an answer: strong ETag, nothing to run, nothing to sniff. */
export function publishedResponse(published: PublishedBytes, request: Request): Response {
  const etag = `"${published.digest}"`;
  const headers = new Headers({
    etag,
    'cache-control': published.isForEver ? CACHE.forEver : CACHE.live,
    'content-security-policy': "default-src 'none'; frame-ancestors 'none'; sandbox",
    'x-content-type-options': 'nosniff',
    'access-control-allow-origin': '*',
    'cross-origin-resource-policy': 'cross-origin',
  });
  if (holdsAlready(request.headers.get('if-none-match'), etag)) return new Response(null, { status: 304, headers });
  headers.set('content-type', published.type.startsWith('image/') ? published.type : `${published.type}; charset=utf-8`);
  headers.set('content-disposition', `inline; filename="${published.fileName}"`);
  headers.set('content-length', String(published.bytes.length));
  return new Response(new Uint8Array(published.bytes), { headers });
}

const holdsAlready = (ifNoneMatch: string | null, etag: string): boolean =>
  ifNoneMatch !== null && ifNoneMatch.split(',').some((tag) => tag.trim() === '*' || tag.trim().replace(/^W\//, '') === etag);
