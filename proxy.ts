import { NextResponse, type NextRequest } from 'next/server';

/**
 * Gives each page its own nonce. Nothing is authorised here: who may see what is decided where
 * data is read, because a check in front of the pages can be walked around.
 */
export function proxy(request: NextRequest): NextResponse {
  const nonce = Buffer.from(crypto.getRandomValues(new Uint8Array(18))).toString('base64');
  const policy = contentSecurityPolicy(nonce, process.env.NODE_ENV === 'development');
  const headers = new Headers(request.headers);
  headers.set('x-nonce', nonce);
  headers.set('content-security-policy', policy); // the framework reads the nonce for its own scripts from here
  const response = NextResponse.next({ request: { headers } });
  response.headers.set('content-security-policy', policy);
  return response;
}

function contentSecurityPolicy(nonce: string, development: boolean): string {
  return [
    `default-src 'self'`,
    // Only the development server evaluates code, to name the lines of an error.
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ''}`,
    development ? `style-src 'self' 'unsafe-inline'` : `style-src 'self' 'nonce-${nonce}'`,
    `style-src-attr 'unsafe-inline'`, // formulas and plots place their parts by style attributes
    `img-src 'self' blob: data:`,
    `font-src 'self'`,
    `connect-src 'self'`,
    `worker-src 'self' blob:`,
    `object-src 'none'`,
    `base-uri 'none'`,
    `form-action 'self'`,
    `frame-ancestors 'none'`,
  ].join('; ');
}

/** `api` stays out: on every path covered here the framework cuts request bodies at 10 MB, silently. */
export const config = { matcher: ['/((?!api/|_next/|healthz$|readyz$).*)'] };
