import { randomUUID } from 'node:crypto';
import type { Problem } from '@/lib/kernel/problem';
import { assertNever } from '@/lib/kernel/assert-never';
import type { BadCredential } from '@/lib/auth/current-actor';
import type { CredentialFault } from '@/lib/auth/find-token';
import type { AppError, AppErrorCode } from '@/lib/services/app-error';

/** What a door adds to the ways a verb can end: the request never reached a verb. */
export type DoorErrorCode = AppErrorCode | 'foreign-origin' | 'bad-credential' | 'too-large' | 'unsupported-media' | 'method-not-allowed' | 'precondition-required' | 'misdirected' | 'malformed';

export interface DoorError {
  readonly code: DoorErrorCode;
  readonly sentence: string;
  readonly problems?: readonly Problem[];
  readonly retryAfterS?: number;
  readonly reference?: string;
  /** A token would need one of these. */
  readonly scopes?: readonly string[] | null;
}

export const FOREIGN_ORIGIN: DoorError = {
  code: 'foreign-origin',
  sentence: 'The request did not come from this site. Send it from a page of this site, or with a bearer token.',
};
const CREDENTIAL_SENTENCES: Readonly<Record<CredentialFault, string>> = {
  'unknown-token': 'The token in the Authorization header is not known here. Expected: Bearer and a token that begins with cf_. Make a new one, or leave the header out.',
  'expired-token': 'This token has expired. Make a new one in your account.',
  'revoked-token': 'This token was revoked. Make a new one in your account.',
};
export const badCredential = ({ reason }: BadCredential): DoorError => ({ code: 'bad-credential', sentence: CREDENTIAL_SENTENCES[reason] });
export const TOKEN_ELSEWHERE: DoorError = { code: 'denied', sentence: 'A token is for the addresses under /api/v1. Sign in to do this on a page of this site.' };

export const VERSION_WANTED: DoorError = {
  code: 'precondition-required',
  sentence: 'The edit names no version. Send If-Match with the ETag of the draft, or `version` in the body.',
};

export function statusOf(code: DoorErrorCode): number {
  switch (code) {
    case 'invalid': return 422;
    case 'malformed': return 400;
    case 'signed-out': case 'bad-credential': return 401;
    case 'denied': case 'foreign-origin': return 403;
    case 'not-found': return 404;
    case 'method-not-allowed': return 405;
    case 'conflict': return 409;
    case 'precondition': return 412;
    case 'too-large': return 413;
    case 'unsupported-media': return 415;
    case 'misdirected': return 421;
    case 'precondition-required': return 428;
    case 'limit': return 429;
    case 'defect': return 500;
    default: return assertNever(code);
  }
}

const TITLES: Readonly<Record<DoorErrorCode, string>> = {
  malformed: 'Not HTTP as we read it',
  invalid: 'Not acceptable as sent',
  'signed-out': 'Nobody is signed in',
  'bad-credential': 'Token not known',
  denied: 'Not part of your role',
  'foreign-origin': 'Sent from elsewhere',
  'not-found': 'Nothing here',
  'method-not-allowed': 'No such method here',
  conflict: 'Things have moved on',
  precondition: 'Not the version you saw',
  'too-large': 'Too large',
  'unsupported-media': 'Not a form we read',
  misdirected: 'Another host was asked',
  'precondition-required': 'Which version is meant?',
  limit: 'Too often',
  defect: 'A defect of ours',
};

/** The body of RFC 9457. It names neither path nor id, so that a denied read and an unknown id are the same bytes. */
export const problemBody = (error: DoorError) => ({
  type: `/problems/${error.code}`,
  title: TITLES[error.code],
  status: statusOf(error.code),
  detail: error.sentence,
  ...(error.problems && { problems: error.problems }),
  ...(error.reference && { reference: error.reference }),
});

export function problemResponse(error: DoorError): Response {
  const headers = new Headers({ 'content-type': 'application/problem+json', 'cache-control': 'no-store' });
  if (error.retryAfterS !== undefined) headers.set('retry-after', String(Math.ceil(error.retryAfterS)));
  const challenge = challengeOf(error);
  if (challenge) headers.set('www-authenticate', challenge);
  return new Response(JSON.stringify(problemBody(error)), { status: statusOf(error.code), headers });
}

/** RFC 6750: what is wrong with the token, or that one is wanted. */
function challengeOf({ code, scopes }: DoorError): string | null {
  if (code === 'signed-out') return 'Bearer realm="counterfoil"';
  if (code === 'bad-credential') return 'Bearer realm="counterfoil", error="invalid_token"';
  return scopes ? `Bearer realm="counterfoil", error="insufficient_scope", scope="${scopes.join(' ')}"` : null;
}

/** What nobody foresaw: the reader gets a reference, the log gets the cause. */
export function reportDefect(where: string, cause: unknown): DoorError {
  const reference = randomUUID();
  const detail = cause instanceof Error ? { message: cause.message, stack: cause.stack, cause: String(cause.cause ?? '') } : { message: String(cause) };
  console.error(JSON.stringify({ level: 'error', at: new Date().toISOString(), where, reference, ...detail }));
  return { code: 'defect', sentence: `Something broke on our side. Nothing was changed. Tell the administrator the reference ${reference}.`, reference };
}

export const asDoorError = (error: AppError): DoorError => error;
