/**
 * The doors. Every route handler and server action goes through one wrapper each, and what comes in
 * is judged here before any verb runs: where it was sent from, who sends it, whether it has the
 * right shape, and how often. What may be done is not decided here but in `lib/policy`.
 *
 * This file: is a writing request one of ours? The framework takes actions without an Origin, believes
 * X-Forwarded-Host and does not look at route handlers at all, so this is asked for every non-GET.
 */
export type OriginVerdict = 'ours' | 'foreign';

const READING = ['GET', 'HEAD'];

export function judgeOrigin(method: string, headers: Headers, allowed: readonly string[]): OriginVerdict {
  if (READING.includes(method)) return 'ours';
  const site = headers.get('sec-fetch-site');
  const origin = headers.get('origin');
  // A browser never adds an Authorization header by itself, and such a request never uses the cookie.
  if (/^bearer \S/i.test(headers.get('authorization') ?? '')) return 'ours';
  if (origin !== null) return allowed.includes(origin) && site !== 'cross-site' ? 'ours' : 'foreign';
  return site === 'same-origin' ? 'ours' : 'foreign';
}
