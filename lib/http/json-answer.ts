import { createHash } from 'node:crypto';

/** What an answer may carry beside its body. */
export interface AnswerShape {
  readonly status: number;
  /** Begins the entity tag, so that a later If-Match can be read; the rest is the digest of the body. */
  readonly tag?: string | undefined;
  readonly headers?: Readonly<Record<string, string>> | undefined;
}

/** JSON with a strong entity tag; 304 to a reader that holds the same bytes, and the way to the next page where there is one. */
export function jsonAnswer(value: unknown, request: Request, { status, tag, headers: more }: AnswerShape): Response {
  const body = JSON.stringify(value ?? null);
  const headers = new Headers({ 'content-type': 'application/json', 'cache-control': 'no-store', ...more });
  const next = nextPage(value, request);
  if (next) headers.set('link', `<${next}>; rel="next"`);
  if (request.method !== 'GET' && request.method !== 'HEAD') return new Response(body, { status, headers });
  const etag = `"${tag === undefined ? '' : `${tag}.`}${createHash('sha256').update(body).digest('hex').slice(0, 32)}"`;
  headers.set('etag', etag);
  if (!holdsAlready(request.headers.get('if-none-match'), etag)) return new Response(body, { status, headers });
  headers.delete('content-type');
  return new Response(null, { status: 304, headers });
}

/** Weak comparison, as RFC 9110 asks of If-None-Match. */
export const holdsAlready = (ifNoneMatch: string | null, etag: string): boolean =>
  ifNoneMatch !== null && ifNoneMatch.split(',').some((tag) => tag.trim() === '*' || tag.trim().replace(/^W\//, '') === etag);

/** The same question with the cursor of the next page. */
function nextPage(value: unknown, request: Request): string | null {
  const next = (value as { next?: unknown } | null)?.next;
  if (typeof next !== 'string' || request.method !== 'GET') return null;
  const address = new URL(request.url);
  address.searchParams.set('cursor', next);
  return `${address.pathname}?${address.searchParams.toString()}`;
}
