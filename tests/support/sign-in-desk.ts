import { closeDatabase, openDatabase, useDatabase } from '@/db/client';
import type { AccountRole } from '@/lib/policy/account-role';
import type { Actor } from '@/lib/policy/actor';
import { currentActor } from '@/lib/auth/current-actor';
import { serveAuth } from '@/lib/http/serve-auth';
import { createAccount } from '@/lib/services/accounts/create-account';
import { startOpenIdProvider, type OpenIdProvider } from '@/lib/tools/fakes/openid-provider';
import { freshDatabase } from './database';

/** The sign-in doors of one process, with a provider to go to, for a person who keeps their cookies. */
export const DESK_ORIGIN = 'http://127.0.0.1:3210';
export const DESK_PASSWORD = 'seven quiet herons';

export interface SignInDesk {
  readonly provider: OpenIdProvider;
  rows<T>(text: string, ...values: unknown[]): Promise<T[]>;
  account(name: string, role?: AccountRole): Promise<{ readonly id: string; readonly email: string }>;
  close(): Promise<void>;
}

export async function openSignInDesk(extra: Readonly<Record<string, string>> = {}): Promise<SignInDesk> {
  const client = { clientId: 'counterfoil-under-test', clientSecret: 'nT5_w0Rj2-kq8LmZx71y' };
  const [db, provider] = await Promise.all([freshDatabase(), startOpenIdProvider(client)]);
  Object.assign(process.env, {
    DATABASE_URL: db.webUrl, APP_URL: DESK_ORIGIN, DEMO: '1', NODE_ENV: 'test', AUTH_SECRET: 'kD82nfa-0Qmz_71pLxYw93hVtRs56bGc',
    S3_BUCKET: 'files', S3_ACCESS_KEY_ID: 'files', S3_SECRET_ACCESS_KEY: 'qPz81kd_77Lmc0aXvB',
    ORCID_ISSUER: provider.issuer, ORCID_CLIENT_ID: client.clientId, ORCID_CLIENT_SECRET: client.clientSecret, ...extra,
  });
  useDatabase(openDatabase(db.webUrl, { onError: () => undefined }));
  const owner = openDatabase(db.ownerUrl, { max: 2, onError: () => undefined });
  return {
    provider,
    rows: async <T>(text: string, ...values: unknown[]) => (await owner.$client.query(text, values)).rows as T[],
    async account(name, role = 'member') {
      const email = `${name.toLowerCase().replace(/[^a-z]+/g, '-')}@larkfield.example`;
      return { id: await createAccount({ name, email, role, affiliation: null, password: DESK_PASSWORD }), email };
    },
    async close() {
      await Promise.all([closeDatabase(), owner.$client.end(), provider.stop()]);
      await db.drop();
    },
  };
}

/** A browser without pages: it sends what it was given, and forgets what it is told to forget. */
export class Visitor {
  readonly cookies = new Map<string, string>();

  headers(): Headers {
    return new Headers({ cookie: [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ') });
  }

  async post(path: string, body: unknown = {}): Promise<Response> {
    const headers = { 'content-type': 'application/json', origin: DESK_ORIGIN, cookie: this.headers().get('cookie') ?? '' };
    return this.#keep(await serveAuth(new Request(`${DESK_ORIGIN}/api/auth${path}`, { method: 'POST', headers, body: JSON.stringify(body) })));
  }

  async get(address: string): Promise<Response> {
    return this.#keep(await serveAuth(new Request(new URL(address, DESK_ORIGIN), { headers: this.headers() })));
  }

  signIn = (email: string, password = DESK_PASSWORD): Promise<Response> => this.post('/sign-in/email', { email, password });

  async actor(): Promise<Actor> {
    const found = await currentActor(this.headers());
    if (!found.ok) throw new Error(found.error.reason);
    return found.value;
  }

  /** To the provider as `person` and back; the answer of our callback. */
  async throughOrcid(person: string, { path = '/sign-in/social', body = { next: '/desk' } }: { path?: string; body?: unknown } = {}): Promise<Response> {
    const begun = await this.post(path, body);
    if (!begun.ok) return begun;
    const { url } = (await begun.json()) as { url: string };
    const back = await fetch(`${url}&person=${person}`, { redirect: 'manual' });
    return this.get(back.headers.get('location') ?? '/');
  }

  #keep(answer: Response): Response {
    for (const line of answer.headers.getSetCookie()) {
      const [pair = '', ...rest] = line.split(';');
      const at = pair.indexOf('=');
      if (rest.some((part) => /max-age=0/i.test(part)) || pair.slice(at + 1) === '') this.cookies.delete(pair.slice(0, at));
      else this.cookies.set(pair.slice(0, at), pair.slice(at + 1));
    }
    return answer;
  }
}
