import { getAuthTables } from 'better-auth/db';
import { getTableColumns } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { closeDatabase, database, openDatabase, useDatabase } from '@/db/client';
import { accounts, rateLimits, sessions, twoFactors, users, verifications } from '@/db/schema/accounts';
import { createAuth } from '@/lib/auth/auth';
import { currentActor } from '@/lib/auth/current-actor';
import { hashesRunning, hashPassword, verifyPassword } from '@/lib/auth/password-hash';
import { noteWrongGuess } from '@/lib/http/guess-limit';
import { serveAuth } from '@/lib/http/serve-auth';
import { createAccount } from '@/lib/services/accounts/create-account';
import { freshDatabase, type FreshDatabase } from '../../support/database';

const ORIGIN = 'http://127.0.0.1:3210';
const PASSWORD = 'seven quiet herons';
// One hash takes 128 MiB and, on a busy machine, seconds.
vi.setConfig({ testTimeout: 180_000 });
let db: FreshDatabase;

beforeAll(async () => {
  db = await freshDatabase();
  Object.assign(process.env, {
    DATABASE_URL: db.webUrl, APP_URL: ORIGIN, DEMO: '1', NODE_ENV: 'test', AUTH_SECRET: 'kD82nfa-0Qmz_71pLxYw93hVtRs56bGc',
    S3_BUCKET: 'files', S3_ACCESS_KEY_ID: 'files', S3_SECRET_ACCESS_KEY: 'qPz81kd_77Lmc0aXvB',
  });
  useDatabase(openDatabase(db.webUrl));
  await createAccount({ name: 'T. Marrable', email: 'Marrable@larkfield.example', role: 'member', affiliation: null, password: PASSWORD });
});
afterAll(async () => {
  await closeDatabase();
  await db.drop();
});

const post = (path: string, body: unknown, headers: Record<string, string> = {}) =>
  serveAuth(new Request(`${ORIGIN}/api/auth${path}`, { method: 'POST', headers: { 'content-type': 'application/json', origin: ORIGIN, ...headers }, body: JSON.stringify(body) }));
const cookieOf = (response: Response): string => response.headers.getSetCookie().map((c) => c.split(';')[0]).join('; ');
const signIn = (password = PASSWORD) => post('/sign-in/email', { email: 'marrable@larkfield.example', password });
const rows = async <T>(text: string, ...values: unknown[]): Promise<T[]> => (await database().$client.query(text, values)).rows as T[];

describe('tables', () => {
  it('have every column the sign-in library asks for', () => {
    const auth = createAuth({ database: database(), env: { APP_URL: ORIGIN, DEMO: true, AUTH_SECRET: 'kD82nfa-0Qmz_71pLxYw93hVtRs56bGc' }, post: async () => undefined });
    const ours = { user: users, session: sessions, account: accounts, verification: verifications, rateLimit: rateLimits, twoFactor: twoFactors } as const;
    const wanted = getAuthTables(auth.options);
    expect(Object.keys(wanted).sort()).toEqual(Object.keys(ours).sort());
    for (const [name, table] of Object.entries(wanted)) {
      const columns = Object.keys(getTableColumns(ours[name as keyof typeof ours]));
      expect(columns, name).toEqual(expect.arrayContaining(['id', ...Object.keys(table.fields)]));
    }
  });
});

describe('passwords', () => {
  it('are hashed by scrypt at N = 2^17, r = 8, p = 1 and verified only by themselves', async () => {
    const hash = await hashPassword(PASSWORD);
    expect(hash).toMatch(/^scrypt\$17\$8\$1\$/);
    expect(await verifyPassword({ hash, password: PASSWORD })).toBe(true);
    expect(await verifyPassword({ hash, password: `${PASSWORD} ` })).toBe(false);
    expect(await verifyPassword({ hash: 'scrypt$30$8$1$AAAA$AAAA', password: PASSWORD })).toBe(false);
  });

  it('are hashed at most two at once', async () => {
    let most = 0;
    const many = Promise.all(Array.from({ length: 5 }, () => hashPassword(PASSWORD)));
    const watch = setInterval(() => (most = Math.max(most, hashesRunning())), 1);
    await many;
    clearInterval(watch);
    expect(most).toBe(2);
    expect(hashesRunning()).toBe(0);
  });

  it('shorter than 15 characters open no account', async () => {
    const answer = await post('/sign-up/email', { email: 'short@larkfield.example', password: 'fourteen chars', name: 'Short' });
    expect(answer.status).toBe(400);
    expect(await rows('select 1 from users where email = $1', 'short@larkfield.example')).toEqual([]);
  });
});

describe('signing in', () => {
  it('gives a cookie that scripts cannot read, and an actor', async () => {
    const answer = await signIn();
    expect(answer.status).toBe(200);
    const cookie = answer.headers.getSetCookie().find((c) => c.startsWith('counterfoil.session='));
    expect(cookie).toMatch(/HttpOnly/i);
    expect(cookie).toMatch(/SameSite=Lax/i);
    const actor = await currentActor(new Headers({ cookie: cookieOf(answer) }));
    expect(actor).toMatchObject({ ok: true, value: { kind: 'member', name: 'T. Marrable', accountRole: 'member' } });
  });

  it('behind https names the cookie __Host- and marks it Secure', async () => {
    const auth = createAuth({ database: database(), env: { APP_URL: 'https://counterfoil.example', DEMO: false, AUTH_SECRET: 'kD82nfa-0Qmz_71pLxYw93hVtRs56bGc' }, post: async () => undefined });
    const { authCookies } = await auth.$context;
    expect(authCookies.sessionToken.name).toBe('__Host-counterfoil.session');
    expect(authCookies.sessionToken.attributes).toMatchObject({ secure: true, httpOnly: true, path: '/' });
    expect(authCookies.sessionToken.attributes.domain).toBeUndefined();
  });

  it('refuses a wrong password and an unknown address in the same words', async () => {
    const wrong = await signIn('seven quiet heronz');
    const unknown = await post('/sign-in/email', { email: 'nobody@larkfield.example', password: PASSWORD });
    expect([wrong.status, await wrong.text()]).toEqual([unknown.status, await unknown.text()]);
    expect(wrong.status).toBe(401);
  });

  it('rests after ten wrong passwords for one address', async () => {
    expect((await post('/sign-in/email', { email: 'guessed@larkfield.example', password: 'a wrong password' })).status).toBe(401);
    for (let i = 0; i < 9; i++) await noteWrongGuess('Guessed@larkfield.example');
    const answer = await post('/sign-in/email', { email: 'guessed@larkfield.example', password: PASSWORD });
    expect(answer.status).toBe(429);
    expect(answer.headers.get('retry-after')).toMatch(/^\d+$/);
  });

  it('takes no field that the form does not have', async () => {
    expect((await post('/sign-up/email', { email: 'role@larkfield.example', password: PASSWORD, name: 'R', role: 'administrator' })).status).toBe(422);
  });

  it('is not open to another site', async () => {
    expect((await post('/sign-in/email', { email: 'marrable@larkfield.example', password: PASSWORD }, { origin: 'https://elsewhere.example' })).status).toBe(403);
  });

  it('leaves every other door of the library shut', async () => {
    expect((await post('/update-user', { name: 'X' })).status).toBe(404);
    expect((await serveAuth(new Request(`${ORIGIN}/api/auth/ok`))).status).toBe(404);
  });
});

describe('a session', () => {
  it('ends after twelve idle hours', async () => {
    await rows('delete from sessions');
    const cookie = cookieOf(await signIn());
    await rows(`update sessions set updated_at = now() - interval '11 hours 59 minutes'`);
    expect(await currentActor(new Headers({ cookie }))).toMatchObject({ value: { kind: 'member' } });
    await rows(`update sessions set updated_at = now() - interval '12 hours 1 minute'`);
    expect(await currentActor(new Headers({ cookie }))).toMatchObject({ value: { kind: 'visitor' } });
    expect(await rows('select 1 from sessions')).toEqual([]);
  });

  it('ends seven days after it began, used or not', async () => {
    const cookie = cookieOf(await signIn());
    const [session] = await rows<{ days: number }>('select extract(epoch from expires_at - created_at)::float / 86400 as days from sessions order by created_at desc limit 1');
    expect(session?.days).toBeCloseTo(7, 3);
    await rows(`update sessions set created_at = created_at - interval '8 days', expires_at = expires_at - interval '8 days'`);
    expect(await currentActor(new Headers({ cookie }))).toMatchObject({ value: { kind: 'visitor' } });
  });

  it('is not used when the request shows another credential', async () => {
    const cookie = cookieOf(await signIn());
    expect(await currentActor(new Headers({ cookie, authorization: 'Bearer cf_unknown' }))).toEqual({ ok: false, error: { reason: 'unknown-token' } });
    expect(await currentActor(new Headers({ cookie, authorization: '' }))).toEqual({ ok: false, error: { reason: 'unknown-token' } });
  });

  it('cannot be made from a forged cookie', async () => {
    const [session] = await rows<{ token: string }>('select token from sessions limit 1');
    for (const value of [session?.token ?? '', `${session?.token}.AAAA`, 'x.y', '%'])
      expect(await currentActor(new Headers({ cookie: `counterfoil.session=${value}` }))).toMatchObject({ value: { kind: 'visitor' } });
  });
});

describe('a forgotten password', () => {
  it('is replaced through a mailed link, once, and all sessions end', async () => {
    const cookie = cookieOf(await signIn());
    expect((await post('/request-password-reset', { email: 'marrable@larkfield.example' })).status).toBe(200);
    const [mail] = await rows<{ recipient: string; body: string }>(`select recipient, body from outbox where subject = 'Choose a new password'`);
    expect(mail?.recipient).toBe('marrable@larkfield.example');
    const token = /reset-password\?token=(\S+)/.exec(mail?.body ?? '')?.[1] ?? '';
    const changed = await post('/reset-password', { token, newPassword: 'eight quiet herons' });
    expect(changed.status).toBe(200);
    expect(await currentActor(new Headers({ cookie }))).toMatchObject({ value: { kind: 'visitor' } });
    expect((await post('/reset-password', { token, newPassword: 'nine quiet herons!' })).status).toBe(400);
    expect((await signIn('eight quiet herons')).status).toBe(200);
  });

  it('says the same to an address nobody has', async () => {
    const known = await post('/request-password-reset', { email: 'marrable@larkfield.example' });
    const unknown = await post('/request-password-reset', { email: 'nobody@larkfield.example' });
    expect([unknown.status, await unknown.text()]).toEqual([known.status, await known.text()]);
  });
});

describe('a new account', () => {
  it('is not open until its address is confirmed by the mailed link', async () => {
    const body = { email: 'new@saltern.example', password: 'a password of my own' };
    expect((await post('/sign-up/email', { ...body, name: 'M. Ondaro' })).status).toBe(200);
    expect((await post('/sign-in/email', body)).status).toBe(403);
    const [mail] = await rows<{ body: string }>(`select body from outbox where subject = 'Confirm your address' and recipient = $1`, body.email);
    const link = /(http\S+verify-email\S+)/.exec(mail?.body ?? '')?.[1] ?? '';
    expect(link.startsWith(ORIGIN)).toBe(true);
    expect((await serveAuth(new Request(link))).status).toBeLessThan(400);
    expect((await post('/sign-in/email', body)).status).toBe(200);
  });

  it('with an address that exists answers as if it were new', async () => {
    const answer = await post('/sign-up/email', { email: 'marrable@larkfield.example', password: 'a password of my own', name: 'T. Marrable' });
    expect(answer.status).toBe(200);
    expect(await rows('select 1 from users where email = $1', 'marrable@larkfield.example')).toHaveLength(1);
  });
});
