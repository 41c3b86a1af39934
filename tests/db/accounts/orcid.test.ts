import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { serveAuth } from '@/lib/http/serve-auth';
import { mayGenerally } from '@/lib/policy/grant';
import { confirmAddress, giveAddress, giveUpAccount } from '@/lib/services/accounts/give-address';
import { getOwnAccount } from '@/lib/services/accounts/get-own-account';
import { unlinkOrcid } from '@/lib/services/accounts/unlink-orcid';
import { createDraft } from '@/lib/services/submissions/create-draft';
import { OPENID_PEOPLE } from '@/lib/tools/fakes/openid-people';
import { must } from '../../support/service-desk';
import { DESK_PASSWORD, Visitor, openSignInDesk, type SignInDesk } from '../../support/sign-in-desk';

vi.setConfig({ testTimeout: 180_000 });
const [FIRST, SECOND, THIRD, FOURTH, FIFTH] = OPENID_PEOPLE.map(({ id }) => id) as [string, string, string, string, string];
let desk: SignInDesk;

beforeAll(async () => {
  desk = await openSignInDesk();
});
afterAll(() => desk.close());

const lastLetter = async (to: string): Promise<{ subject: string; body: string }> => {
  const [letter] = await desk.rows<{ subject: string; body: string }>('select subject, body from outbox where recipient = $1 order by created_at desc limit 1', to);
  return letter ?? { subject: '', body: '' };
};
const tokenIn = (body: string): string => /\/account\/address\?token=([\w-]+)/.exec(body)?.[1] ?? '';
const linksOf = (id: string) => desk.rows<{ user_id: string }>(`select user_id from accounts where provider_id = 'orcid' and account_id = $1`, id);

describe('the first sign-in with ORCID', () => {
  const visitor = new Visitor();

  it('opens an account for (provider, subject), and leads to the page that asks for an address', async () => {
    const answer = await visitor.throughOrcid(FIRST);
    expect(answer.status).toBe(302);
    expect(answer.headers.get('location')).toBe('/account/address?next=%2Fdesk');
    expect(await visitor.actor()).toMatchObject({ kind: 'member', name: 'T. Marrable', lacks: 'confirmed-address' });
    expect(await linksOf(FIRST)).toHaveLength(1);
  });

  it('keeps no token of ORCID', async () => {
    expect(await desk.rows(`select 1 from accounts where access_token is not null or refresh_token is not null or id_token is not null`)).toEqual([]);
  });

  it('sends no letter to the address that stands in for one', async () => {
    expect(await desk.rows('select 1 from outbox')).toEqual([]);
    expect(must(await getOwnAccount(await visitor.actor()))).toMatchObject({ email: null, orcid: { id: FIRST }, hasPassword: false });
  });

  it('lets the account read and nothing else, and says why', async () => {
    const actor = await visitor.actor();
    const tried = await createDraft(actor, { title: 'Too early' });
    expect(tried).toMatchObject({ ok: false, error: { code: 'denied', sentence: expect.stringContaining('/account/address') } });
    expect(mayGenerally('register.read', actor).ok).toBe(true);
  });

  it('takes the address once its link is opened in the same account, and not before', async () => {
    must(await giveAddress(await visitor.actor(), { name: 'T. Marrable', email: 'Marrable@larkfield.example' }));
    const letter = await lastLetter('Marrable@larkfield.example');
    expect(letter.subject).toBe('Confirm your address');
    const token = tokenIn(letter.body);
    const stranger = new Visitor();
    await stranger.throughOrcid(SECOND);
    expect(await confirmAddress(await stranger.actor(), { token })).toMatchObject({ ok: false, error: { code: 'precondition' } });
    expect(await confirmAddress(await visitor.actor(), { token: `${token.slice(0, -2)}xx` })).toMatchObject({ ok: false });
    must(await confirmAddress(await visitor.actor(), { token }));
    expect(await visitor.actor()).not.toHaveProperty('lacks');
    expect(await confirmAddress(await visitor.actor(), { token })).toMatchObject({ ok: false });
    must(await createDraft(await visitor.actor(), { title: 'Now it may' }));
  });

  it('comes back to the same account under another session', async () => {
    const before = visitor.cookies.get('counterfoil.session');
    const answer = await visitor.throughOrcid(FIRST);
    expect(answer.headers.get('location')).toBe('/desk');
    expect(visitor.cookies.get('counterfoil.session')).not.toBe(before);
    expect(await linksOf(FIRST)).toHaveLength(1);
    expect(await desk.rows(`select 1 from audit_entries where action = 'account.sign-in.orcid'`)).not.toEqual([]);
  });
});

describe('an address that has an account already', () => {
  it('is never joined to the new one: the letter tells its owner, the page says nothing', async () => {
    const { email, id } = await desk.account('J. Pellworm');
    const visitor = new Visitor();
    await visitor.throughOrcid(FOURTH);
    must(await giveAddress(await visitor.actor(), { name: 'J. Pellworm', email }));
    const letter = await lastLetter(email);
    expect(letter.subject).toBe('This address has an account already');
    expect(tokenIn(letter.body)).toBe('');
    expect((await linksOf(FOURTH))[0]?.user_id).not.toBe(id);
    expect(await visitor.actor()).toHaveProperty('lacks', 'confirmed-address');
  });

  it('gets the iD when the new account is given up and the old one links it, with its password', async () => {
    const visitor = new Visitor();
    await visitor.throughOrcid(FOURTH);
    must(await giveUpAccount(await visitor.actor()));
    expect(await visitor.actor()).toEqual({ kind: 'visitor' });
    expect((await visitor.signIn('j-pellworm@larkfield.example')).status).toBe(200);
    expect((await visitor.throughOrcid(FOURTH, { path: '/link-social', body: {} })).status).toBe(400);
    expect((await visitor.throughOrcid(FOURTH, { path: '/link-social', body: { password: 'eight loud herons' } })).status).toBe(400);
    expect(await linksOf(FOURTH)).toEqual([]);
    const linked = await visitor.throughOrcid(FOURTH, { path: '/link-social', body: { password: DESK_PASSWORD } });
    expect(linked.headers.get('location')).toBe('/account?linked=orcid');
    expect(must(await getOwnAccount(await visitor.actor())).orcid?.id).toBe(FOURTH);
    const other = new Visitor();
    await other.throughOrcid(FOURTH);
    expect(await other.actor()).toMatchObject({ name: 'J. Pellworm', userId: (await linksOf(FOURTH))[0]?.user_id });
  });

  it('does not take an iD that belongs to somebody else here', async () => {
    const { email } = await desk.account('A. Corriedale');
    const visitor = new Visitor();
    await visitor.signIn(email);
    const answer = await visitor.throughOrcid(FOURTH, { path: '/link-social', body: { password: DESK_PASSWORD } });
    expect(answer.headers.get('location')).toBe('/account?error=account_already_linked_to_different_user');
  });

  it('lets go of its iD only while a password is left', async () => {
    const visitor = new Visitor();
    await visitor.signIn('j-pellworm@larkfield.example');
    must(await unlinkOrcid(await visitor.actor()));
    expect(await linksOf(FOURTH)).toEqual([]);
    const orcidAlone = new Visitor();
    await orcidAlone.throughOrcid(FIRST);
    expect(await unlinkOrcid(await orcidAlone.actor())).toMatchObject({ ok: false, error: { code: 'precondition' } });
    expect(await linksOf(FIRST)).toHaveLength(1);
  });
});

describe('on the way back from ORCID', () => {
  it('nobody is signed in whose browser did not begin the sign-in', async () => {
    const begun = (await (await new Visitor().post('/sign-in/social', { next: '/' })).json()) as { url: string };
    const back = await fetch(`${begun.url}&person=${FIFTH}`, { redirect: 'manual' });
    const other = new Visitor();
    const answer = await other.get(back.headers.get('location') ?? '/');
    expect(answer.headers.get('location')).toContain('error=state_');
    expect(await other.actor()).toEqual({ kind: 'visitor' });
    expect(await linksOf(FIFTH)).toEqual([]);
  });

  it('a code does not work twice, nor does one that was made up', async () => {
    const visitor = new Visitor();
    const { url } = (await (await visitor.post('/sign-in/social', { next: '/' })).json()) as { url: string };
    const back = new URL((await fetch(`${url}&person=${THIRD}`, { redirect: 'manual' })).headers.get('location') ?? '');
    const forged = new URL(back);
    forged.searchParams.set('code', 'made-up');
    expect((await visitor.get(forged.href)).headers.get('location')).toContain('error=');
    expect((await visitor.get(back.href)).headers.get('location')).toContain('error=');
    expect(await visitor.actor()).toEqual({ kind: 'visitor' });
  });

  it('refusing there changes nothing here', async () => {
    const visitor = new Visitor();
    const answer = await visitor.throughOrcid('none');
    expect(answer.headers.get('location')).toBe('/sign-in?next=%2Fdesk&error=access_denied');
  });

  it('leads to no other site', async () => {
    for (const next of ['https://elsewhere.example', '//elsewhere.example', '/\\elsewhere.example', 'desk'])
      expect((await new Visitor().post('/sign-in/social', { next })).status, next).toBe(422);
  });
});

describe('the doors to ORCID', () => {
  it('ask for proof by challenge and bind the answer to a nonce', async () => {
    const { url } = (await (await new Visitor().post('/sign-in/social', { next: '/' })).json()) as { url: string };
    const asked = new URL(url).searchParams;
    expect(asked.get('code_challenge_method')).toBe('S256');
    for (const name of ['state', 'nonce', 'code_challenge']) expect(asked.get(name)?.length, name).toBeGreaterThan(30);
    expect(asked.get('redirect_uri')).toMatch(/\/api\/auth\/callback\/orcid$/);
    expect(asked.get('scope')).toBe('openid');
  });

  it('say so while ORCID is away, and no other door waits for it', async () => {
    const { ORCID_ISSUER } = process.env;
    process.env['ORCID_ISSUER'] = 'http://127.0.0.1:9';
    const elsewhere = 'http://localhost:3210';
    const answer = await serveAuth(new Request(`${elsewhere}/api/auth/sign-in/social`, { method: 'POST', headers: { origin: elsewhere, 'content-type': 'application/json' }, body: '{"next":"/"}' }));
    expect([answer.status, ((await answer.json()) as { code: string }).code]).toEqual([404, 'PROVIDER_NOT_FOUND']);
    expect((await new Visitor().signIn('j-pellworm@larkfield.example')).status).toBe(200);
    Object.assign(process.env, { ORCID_ISSUER });
  });

  it('are not there where ORCID is not configured', async () => {
    const { ORCID_ISSUER, ORCID_CLIENT_ID, ORCID_CLIENT_SECRET } = process.env;
    for (const name of ['ORCID_ISSUER', 'ORCID_CLIENT_ID', 'ORCID_CLIENT_SECRET']) delete process.env[name];
    expect((await new Visitor().post('/sign-in/social', { next: '/' })).status).toBe(404);
    expect((await new Visitor().get('/api/auth/callback/orcid?code=x&state=y')).status).toBe(404);
    Object.assign(process.env, { ORCID_ISSUER, ORCID_CLIENT_ID, ORCID_CLIENT_SECRET });
  });
});
