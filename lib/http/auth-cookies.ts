import 'server-only';
import { cookies, headers } from 'next/headers';
import { parseSetCookieHeader } from 'better-auth/cookies';
import { webEnv } from '@/lib/env';
import { ok } from '@/lib/kernel/result';
import type { Outcome } from '@/lib/services/app-error';
import { serveAuth } from './serve-auth';

/**
 * Asks the sign-in library from a server action, by the same door as the route (its limits count), and
 * hands the cookies it sets to the browser.
 */
export async function askAuth(path: string, body: unknown): Promise<Outcome<null>> {
  const sent = await headers();
  const { APP_URL } = webEnv();
  const request = new Request(`${APP_URL}/api/auth${path}`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', origin: APP_URL, ...forwarded(sent) },
    body: JSON.stringify(body),
  });
  const answer = await serveAuth(request);
  await keepCookies(answer);
  return answer.ok ? ok(null) : refusal(answer);
}

const forwarded = (sent: Headers): Record<string, string> =>
  Object.fromEntries(['cookie', 'x-forwarded-for', 'user-agent'].flatMap((name) => (sent.has(name) ? [[name, sent.get(name) ?? '']] : [])));

async function keepCookies(answer: Response): Promise<void> {
  const jar = await cookies();
  for (const [name, { value, ...set }] of parseSetCookieHeader(answer.headers.getSetCookie().join(', ')))
    jar.set(name, decodeURIComponent(value), { httpOnly: true, secure: set.secure === true, sameSite: 'lax', path: '/', ...(set['max-age'] !== undefined && { maxAge: Number(set['max-age']) }) });
}

async function refusal(answer: Response): Promise<Outcome<null>> {
  const body = (await answer.json().catch(() => ({}))) as { detail?: string; code?: string };
  if (answer.status === 429) return { ok: false, error: { code: 'limit', sentence: body.detail ?? 'Too many tries. Wait a minute and try again.' } };
  return { ok: false, error: { code: 'invalid', sentence: body.detail ?? SENTENCES[body.code ?? ''] ?? 'That did not work. Try again.' } };
}

const SENTENCES: Readonly<Record<string, string>> = {
  INVALID_EMAIL_OR_PASSWORD: 'Address and password do not belong together. Try again, or choose a new password by mail.',
  EMAIL_NOT_VERIFIED: 'This address is not confirmed yet. Open the link in the mail that was just sent.',
  PASSWORD_TOO_SHORT: 'The password is shorter than 15 characters. A few words in a row are easy to keep in mind.',
  PASSWORD_TOO_LONG: 'The password is longer than 256 characters.',
  INVALID_TOKEN: 'The link was used already or is too old. Ask for a new one.',
};
