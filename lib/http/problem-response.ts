import { randomUUID } from 'node:crypto';
import type { Problem } from '@/lib/kernel/problem';
import { assertNever } from '@/lib/kernel/assert-never';
import type { AppError, AppErrorCode } from '@/lib/services/app-error';

/** What a door adds to the ways a verb can end: the request never reached a verb. */
export type DoorErrorCode = AppErrorCode | 'foreign-origin' | 'bad-credential' | 'too-large' | 'unsupported-media' | 'method-not-allowed';

export interface DoorError {
  readonly code: DoorErrorCode;
  readonly sentence: string;
  readonly problems?: readonly Problem[];
  readonly retryAfterS?: number;
  readonly reference?: string;
}

export const FOREIGN_ORIGIN: DoorError = {
  code: 'foreign-origin',
  sentence: 'The request did not come from this site. Send it from a page of this site, or with a bearer token.',
};
export const BAD_CREDENTIAL: DoorError = {
  code: 'bad-credential',
  sentence: 'The token in the Authorization header is not known here. Make a new one, or leave the header out.',
};

export function statusOf(code: DoorErrorCode): number {
  switch (code) {
    case 'invalid': return 422;
    case 'signed-out': case 'bad-credential': return 401;
    case 'denied': case 'foreign-origin': return 403;
    case 'not-found': return 404;
    case 'method-not-allowed': return 405;
    case 'conflict': return 409;
    case 'precondition': return 412;
    case 'too-large': return 413;
    case 'unsupported-media': return 415;
    case 'limit': return 429;
    case 'defect': return 500;
    default: return assertNever(code);
  }
}

const TITLES: Readonly<Record<DoorErrorCode, string>> = {
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
  if (error.code === 'signed-out' || error.code === 'bad-credential') headers.set('www-authenticate', 'Bearer realm="counterfoil"');
  return new Response(JSON.stringify(problemBody(error)), { status: statusOf(error.code), headers });
}

/** What nobody foresaw: the reader gets a reference, the log gets the cause. */
export function reportDefect(where: string, cause: unknown): DoorError {
  const reference = randomUUID();
  const detail = cause instanceof Error ? { message: cause.message, stack: cause.stack, cause: String(cause.cause ?? '') } : { message: String(cause) };
  console.error(JSON.stringify({ level: 'error', at: new Date().toISOString(), where, reference, ...detail }));
  return { code: 'defect', sentence: `Something broke on our side. Nothing was changed. Tell the administrator the reference ${reference}.`, reference };
}

export const asDoorError = (error: AppError): DoorError => error;
