import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { getQueue } from '@/lib/services/reviews/get-queue';
import { OPENID_PEOPLE } from '@/lib/tools/fakes/openid-people';
import { DESK_PASSWORD, Visitor, openSignInDesk, type SignInDesk } from '../../support/sign-in-desk';
import { HALF_MINUTE_MS, totp } from '../../support/totp';

vi.setConfig({ testTimeout: 180_000 });
let desk: SignInDesk;

beforeAll(async () => {
  desk = await openSignInDesk({ DEMO: '0' });
});
afterAll(async () => {
  process.env['DEMO'] = '1';
  await desk.close();
});

interface Enrolled {
  readonly secret: string;
  readonly codes: readonly string[];
}

/** The first code is given for the half minute before, so that the present one is left to sign in with. */
async function enrol(visitor: Visitor): Promise<Enrolled> {
  const made = (await (await visitor.post('/two-factor/enable', { password: DESK_PASSWORD })).json()) as { totpURI: string; backupCodes: string[] };
  const secret = new URL(made.totpURI).searchParams.get('secret') ?? '';
  expect((await visitor.post('/two-factor/verify-totp', { code: totp(secret, Date.now() - HALF_MINUTE_MS) })).status).toBe(200);
  return { secret, codes: made.backupCodes };
}

async function signedIn(email: string): Promise<Visitor> {
  const visitor = new Visitor();
  expect((await visitor.signIn(email)).status).toBe(200);
  return visitor;
}

describe('outside the demonstration', () => {
  it('an editor without a second factor only reads, is told why, and edits once it is there', async () => {
    const { email } = await desk.account('R. Amsel', 'editor');
    const editor = await signedIn(email);
    expect(await editor.actor()).toMatchObject({ lacks: 'second-factor', accountRole: 'editor' });
    expect(await getQueue(await editor.actor())).toMatchObject({ ok: false, error: { code: 'denied', sentence: expect.stringContaining('/account/second-factor') } });
    const before = editor.cookies.get('counterfoil.session');
    await enrol(editor);
    expect(editor.cookies.get('counterfoil.session')).not.toBe(before);
    expect(await editor.actor()).not.toHaveProperty('lacks');
    expect(await getQueue(await editor.actor())).toMatchObject({ ok: true });
  });

  it('a member needs none', async () => {
    const { email } = await desk.account('S. Vasterling');
    expect(await (await signedIn(email)).actor()).not.toHaveProperty('lacks');
  });
});

describe('signing in with a second factor', () => {
  let held: Enrolled;
  let email: string;

  beforeAll(async () => {
    ({ email } = await desk.account('I. Szenthe', 'administrator'));
    held = await enrol(await signedIn(email));
  });

  it('gives no session for the password alone', async () => {
    const visitor = new Visitor();
    const answer = await visitor.signIn(email);
    expect(await answer.json()).toMatchObject({ twoFactorRedirect: true });
    expect(visitor.cookies.has('counterfoil.session')).toBe(false);
    expect(await visitor.actor()).toEqual({ kind: 'visitor' });
  });

  it('gives one for the present code, and no second one for the same code', async () => {
    const code = totp(held.secret);
    const first = await signedIn(email);
    expect((await first.post('/two-factor/verify-totp', { code })).status).toBe(200);
    expect(await first.actor()).toMatchObject({ kind: 'member', accountRole: 'administrator' });
    const second = await signedIn(email);
    expect((await second.post('/two-factor/verify-totp', { code })).status).toBe(409);
    expect(await second.actor()).toEqual({ kind: 'visitor' });
  });

  it('takes each recovery code once', async () => {
    const [code = ''] = held.codes;
    const first = await signedIn(email);
    expect((await first.post('/two-factor/verify-backup-code', { code })).status).toBe(200);
    expect(await first.actor()).toMatchObject({ kind: 'member' });
    const second = await signedIn(email);
    expect((await second.post('/two-factor/verify-backup-code', { code })).status).toBe(401);
    expect(await second.actor()).toEqual({ kind: 'visitor' });
  });

  it('keeps secret and recovery codes encrypted', async () => {
    const rows = await desk.rows<{ secret: string; backup_codes: string }>('select secret, backup_codes from two_factors');
    const stored = JSON.stringify(rows);
    expect(rows.length).toBeGreaterThan(0);
    for (const plain of [held.secret, ...held.codes]) expect(stored).not.toContain(plain);
  });

  it('rests after ten wrong codes, over several sign-ins and for the right code too', async () => {
    // A wrong recovery code counts like a wrong code, and one was given above.
    await desk.rows('update two_factors set failed_verification_count = 0');
    let answer = new Response();
    for (let tries = 0; tries < 10; tries++) {
      const visitor = await signedIn(email);
      answer = await visitor.post('/two-factor/verify-totp', { code: '000000' });
      expect(answer.status).toBe(401);
    }
    const visitor = await signedIn(email);
    answer = await visitor.post('/two-factor/verify-totp', { code: totp(held.secret, Date.now() + HALF_MINUTE_MS) });
    expect(answer.status).toBe(429);
    expect(await visitor.actor()).toEqual({ kind: 'visitor' });
  });
});

describe('coming back from ORCID', () => {
  it('asks for the second factor as well', async () => {
    const orcid = OPENID_PEOPLE[1]?.id ?? '';
    const { email } = await desk.account('H. Brightwater', 'editor');
    const owner = await signedIn(email);
    expect((await owner.throughOrcid(orcid, { path: '/link-social', body: { password: DESK_PASSWORD } })).headers.get('location')).toBe('/account?linked=orcid');
    const { secret } = await enrol(owner);
    const sessionsBefore = await desk.rows('select 1 from sessions');
    const visitor = new Visitor();
    const answer = await visitor.throughOrcid(orcid);
    expect(answer.headers.get('location')).toBe('/sign-in/second-factor?next=%2Fdesk');
    expect(answer.headers.getSetCookie().filter((line) => line.startsWith('counterfoil.session=') && !/max-age=0/i.test(line))).toEqual([]);
    expect(await desk.rows('select 1 from sessions')).toHaveLength(sessionsBefore.length);
    expect(await visitor.actor()).toEqual({ kind: 'visitor' });
    expect((await visitor.post('/two-factor/verify-totp', { code: totp(secret) })).status).toBe(200);
    expect(await visitor.actor()).toMatchObject({ kind: 'member', name: 'H. Brightwater' });
  });
});

describe('a second factor', () => {
  it('is set up, renewed and switched off with the password only', async () => {
    const { email } = await desk.account('K. Dovrel');
    const visitor = await signedIn(email);
    expect((await visitor.post('/two-factor/enable', { password: 'eight loud herons' })).status).toBe(400);
    expect((await visitor.post('/two-factor/enable')).status).toBe(400);
    const { codes } = await enrol(visitor);
    expect((await visitor.post('/two-factor/generate-backup-codes', { password: 'eight loud herons' })).status).toBe(400);
    const renewed = (await (await visitor.post('/two-factor/generate-backup-codes', { password: DESK_PASSWORD })).json()) as { backupCodes: string[] };
    expect(renewed.backupCodes.filter((code) => codes.includes(code))).toEqual([]);
    expect((await visitor.post('/two-factor/disable', { password: 'eight loud herons' })).status).toBe(400);
    expect((await visitor.post('/two-factor/disable', { password: DESK_PASSWORD })).status).toBe(200);
    expect((await (await new Visitor().signIn(email)).json()) as object).not.toHaveProperty('twoFactorRedirect');
  });

  it('is not guessed at by trying passwords inside a session', async () => {
    const { email } = await desk.account('L. Quennell');
    const visitor = await signedIn(email);
    for (let tries = 0; tries < 10; tries++) expect((await visitor.post('/two-factor/enable', { password: 'eight loud herons' })).status).toBe(400);
    expect((await visitor.post('/two-factor/enable', { password: DESK_PASSWORD })).status).toBe(429);
  });

  it('asks an account without a password for a young session instead', async () => {
    const visitor = new Visitor();
    await visitor.throughOrcid(OPENID_PEOPLE[4]?.id ?? '');
    expect((await visitor.post('/two-factor/enable')).status).toBe(403);
    await desk.rows(`update users set email = 'corriedale@oxbow.example', email_verified = true where name = 'A. Corriedale'`);
    await desk.rows(`update sessions set created_at = now() - interval '11 minutes'`);
    expect((await visitor.post('/two-factor/enable')).status).toBe(412);
    await visitor.throughOrcid(OPENID_PEOPLE[4]?.id ?? '');
    expect((await visitor.post('/two-factor/enable')).status).toBe(200);
  });
});
