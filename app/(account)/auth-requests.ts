import { formatProblem, type Problem } from '@/lib/kernel/problem';

/** What the account forms ask of the sign-in service, and its answers as sentences. */
export type AuthAnswer = { readonly ok: true; readonly value: Readonly<Record<string, unknown>> } | { readonly ok: false; readonly sentence: string };

export type AuthPath = 'sign-in/email' | 'sign-up/email' | 'request-password-reset' | 'reset-password' | 'change-password' | 'sign-out' | 'sign-in/social' | 'link-social' | `two-factor/${'enable' | 'disable' | 'generate-backup-codes' | 'verify-totp' | 'verify-backup-code'}`;

const sentences: Readonly<Record<string, string>> = {
  INVALID_EMAIL_OR_PASSWORD: 'This e-mail and password do not belong together. Try again, or set a new password.',
  EMAIL_NOT_VERIFIED: 'This address is not confirmed yet. A new letter with the link is on its way to it; open the link, then sign in.',
  INVALID_PASSWORD: 'The present password is not this one. Try again, or set a new one by mail.',
  INVALID_TOKEN: 'This link has been used or is older than an hour. Ask for a new one.',
  PASSWORD_TOO_SHORT: 'The password has fewer than 15 characters. Four or five unrelated words do well.',
  PASSWORD_TOO_LONG: 'The password has more than 256 characters. Choose a shorter one.',
  INVALID_CODE: 'This code is not the present one. Wait for the next, and see that the clock of your device is right.',
  INVALID_BACKUP_CODE: 'This is none of the recovery codes that are left. Each works once.',
  INVALID_TWO_FACTOR_COOKIE: 'This sign-in has waited longer than ten minutes, or was tried too often. Begin it again.',
  TOO_MANY_ATTEMPTS_REQUEST_NEW_CODE: 'Five wrong codes: begin the sign-in again.',
  ACCOUNT_TEMPORARILY_LOCKED: 'Ten wrong codes in a row: the second factor of this account rests for 15 minutes. Your password alone opens nothing meanwhile.',
  TOTP_ALREADY_ENABLED: 'This account has a second factor already. Reload the page.',
  CREDENTIAL_ACCOUNT_NOT_FOUND: 'This account has no password yet. Set one by mail.',
  PROVIDER_NOT_FOUND: 'ORCID cannot be reached just now. Try again in a minute, or sign in with a password.',
  UNAUTHORIZED: 'Nobody is signed in here any more. Sign in and try again.',
  INVALID_EMAIL: 'This is not an e-mail address. It should look like name@place.example.',
};

function sentenceOf(status: number, body: unknown, retryAfter: string | null): string {
  if (status === 429 && !(body as { detail?: string; code?: string } | null)?.detail && !(body as { code?: string } | null)?.code) return `Too many tries. Wait ${retryAfter ? `${retryAfter} seconds` : 'a minute'} and try again.`;
  const said = (typeof body === 'object' && body !== null ? body : {}) as { code?: string; message?: string; detail?: string; problems?: readonly Problem[] };
  const known = said.code ? sentences[said.code] : undefined;
  const reasons = (said.problems ?? []).map(formatProblem).join(' ');
  return known ?? ([said.detail ?? said.message, reasons].filter(Boolean).join(' ') || 'The sign-in service gave no reason. Try again in a minute.');
}

export async function askAuth(path: AuthPath, body: Readonly<Record<string, unknown>>): Promise<AuthAnswer> {
  try {
    const response = await fetch(`/api/auth/${path}`, { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify(body) });
    const said: unknown = await response.json().catch(() => null);
    if (response.ok) return { ok: true, value: (typeof said === 'object' && said !== null ? said : {}) as Readonly<Record<string, unknown>> };
    return { ok: false, sentence: sentenceOf(response.status, said, response.headers.get('x-retry-after') ?? response.headers.get('retry-after')) };
  } catch {
    return { ok: false, sentence: 'No connection. Nothing was sent; try again when it is back.' };
  }
}

/** Only a path of this site may follow a sign-in, or a link could send people elsewhere. */
export const safeNext = (next: string | string[] | undefined): string =>
  typeof next === 'string' && /^\/(?![/\\])[^\\\u0000-\u001f]*$/.test(next) ? next : '/';
