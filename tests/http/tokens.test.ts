import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { currentActor } from '@/lib/auth/current-actor';
import { TOKEN_ELSEWHERE } from '@/lib/http/problem-response';
import { serveAuth } from '@/lib/http/serve-auth';
import { TOKEN_SCOPES } from '@/lib/policy/token-scopes';
import { createToken as createAction, revokeToken as revokeAction } from '@/app/(account)/account/tokens/actions';
import { GET as listSubmissions, POST as createSubmission } from '@/app/api/v1/submissions/route';
import { createToken, LIVE_TOKENS_AT_MOST } from '@/lib/services/tokens/create-token';
import { listTokens } from '@/lib/services/tokens/list-tokens';
import { revokeToken } from '@/lib/services/tokens/revoke-token';
import { bearer, session, signedIn, type Person } from '../support/interface-desk';
import { must, openServiceDesk, ORIGIN, type ServiceDesk } from '../support/service-desk';

let actionHeaders = new Headers();
vi.mock('next/headers', () => ({ headers: () => Promise.resolve(actionHeaders) }));

let desk: ServiceDesk;
let author: Person;
let other: Person;

beforeAll(async () => {
  desk = await openServiceDesk();
  [author, other] = [await signedIn('T. Marrable', 'larkfield'), await signedIn('L. Quennell', 'saltern')];
});
afterAll(() => desk.close());

const make = async (name = 'a script', who = author) => must(await createToken(who.actor, { name, scopes: ['read'], days: 7 }));
const ask = (headers: Record<string, string>): Promise<Response> => listSubmissions(new Request(`${ORIGIN}/api/v1/submissions`, { headers }), { params: Promise.resolve({}) });
const detailOf = async (answer: Response) => ((await answer.json()) as { detail: string }).detail;

describe('a token', () => {
  it('is 256 random bits shown once; what is kept is its hash, and no dump of the table holds it', async () => {
    const { id, token } = await make();
    expect(token).toMatch(/^cf_[A-Za-z0-9_-]{43}$/);
    const [row] = await desk.sql<{ secret_digest: string; hint: string }>('select * from api_tokens where id = $1', id);
    expect(row?.secret_digest).toBe(createHash('sha256').update(token).digest('hex'));
    expect(JSON.stringify(await desk.sql('select * from api_tokens'))).not.toContain(token.slice(8));
    expect(JSON.stringify(must(await listTokens(author.actor)))).not.toContain(token.slice(8));
    expect(JSON.stringify(await desk.sql(`select details from audit_entries where action = 'account.manage-tokens'`))).not.toContain(token.slice(8));
  });

  it('stands for its owner and needs no Origin to write', async () => {
    const { token } = must(await createToken(author.actor, { name: 'writer', scopes: ['draft'], days: 7 }));
    const form = new FormData();
    form.append('claim', new Blob(['{"format":"counterfoil-claim/1"}']), 'claim.json');
    const answer = await createSubmission(new Request(`${ORIGIN}/api/v1/submissions`, { method: 'POST', headers: bearer(token), body: form }), { params: Promise.resolve({}) });
    expect(answer.status).toBe(201);
    const [entry] = await desk.sql<{ actor_kind: string; actor_id: string; details: { tokenId?: string } }>(`select * from audit_entries where action = 'submission.create' order by at desc limit 1`);
    expect([entry?.actor_kind, entry?.actor_id, typeof entry?.details.tokenId]).toEqual(['token', author.actor.userId, 'string']);
  });

  it('shows its last use, to the minute', async () => {
    const { id, token } = await make('used');
    const seen = async () => must(await listTokens(author.actor)).find((t) => t.id === id)?.lastUsedAt ?? null;
    expect(await seen()).toBeNull();
    expect((await ask(bearer(token))).status).toBe(200);
    const first = await seen();
    expect(first).not.toBeNull();
    await ask(bearer(token));
    expect(await seen()).toBe(first);
  });

  it('opens nothing when revoked, expired, cut short, doubled or guessed, and says which', async () => {
    const revoked = await make('revoked');
    must(await revokeToken(author.actor, revoked.id));
    expect(await detailOf(await ask(bearer(revoked.token)))).toMatch(/was revoked/);
    const expired = await make('expired');
    await desk.sql(`update api_tokens set expires_at = now() - interval '1 second' where id = $1`, expired.id);
    expect(await detailOf(await ask(bearer(expired.token)))).toMatch(/has expired/);
    const { token } = await make();
    for (const authorization of [`Bearer ${token.slice(0, -1)}`, `Bearer ${token}x`, `Bearer ${token}, Bearer ${token}`, `Basic ${token}`, 'Bearer', '', `Bearer cf_${'A'.repeat(43)}`]) {
      const answer = await ask({ authorization, cookie: author.cookie });
      expect([answer.status, answer.headers.get('www-authenticate')], authorization).toEqual([401, 'Bearer realm="counterfoil", error="invalid_token"']);
    }
  });

  it('is revoked by its owner alone, once', async () => {
    const { id, token } = await make('mine');
    expect(await revokeToken(other.actor, id)).toMatchObject({ ok: false, error: { code: 'not-found' } });
    expect((await ask(bearer(token))).status).toBe(200);
    must(await revokeToken(author.actor, id));
    expect(await revokeToken(author.actor, id)).toMatchObject({ ok: false, error: { code: 'not-found' } });
  });

  it('opens no page’s act, no sign-in door and no making of tokens', async () => {
    const { token } = must(await createToken(author.actor, { name: 'all', scopes: [...TOKEN_SCOPES], days: 7 }));
    actionHeaders = new Headers({ ...bearer(token), ...session(author.cookie) });
    expect(await createAction({ name: 'x', scopes: ['read'], days: 7 })).toEqual({ ok: false, error: TOKEN_ELSEWHERE });
    const answer = await serveAuth(new Request(`${ORIGIN}/api/auth/sign-out`, { method: 'POST', headers: { ...bearer(token), ...session(author.cookie) } }));
    expect(answer.status).toBe(403);
    const actor = await currentActor(new Headers(bearer(token)));
    if (!actor.ok) throw new Error('the token is good');
    expect(await createToken(actor.value, { name: 'x', scopes: ['read'], days: 7 })).toMatchObject({ ok: false, error: { code: 'denied' } });
    expect(await listTokens(actor.value)).toMatchObject({ ok: false, error: { code: 'denied' } });
  });

  it('is made and revoked on the account page, with a name, known scopes and an end', async () => {
    actionHeaders = new Headers(session(author.cookie));
    const made = await createAction({ name: ' nightly ', scopes: ['read', 'read'], days: 30 });
    if (!made.ok) throw new Error(made.error.sentence);
    expect(must(await listTokens(author.actor)).find((t) => t.id === made.value.id)).toMatchObject({ name: 'nightly', scopes: ['read'], state: 'live' });
    expect(await revokeAction({ id: made.value.id })).toMatchObject({ ok: true });
    for (const input of [{ name: '', scopes: ['read'], days: 30 }, { name: 'x', scopes: [], days: 30 }, { name: 'x', scopes: ['admin'], days: 30 }, { name: 'x', scopes: ['read'], days: 31 }, { name: 'x', scopes: ['read'], days: 30, userId: other.actor.userId }])
      expect(await createAction(input), JSON.stringify(input)).toMatchObject({ ok: false, error: { code: 'invalid' } });
  });

  it(`is one of at most ${LIVE_TOKENS_AT_MOST}`, async () => {
    for (let i = 0; i < LIVE_TOKENS_AT_MOST; i++) await make(`t${i}`, other);
    expect(await createToken(other.actor, { name: 'one more', scopes: ['read'], days: 7 })).toMatchObject({ ok: false, error: { code: 'limit' } });
  });
});

describe('the table of tokens', () => {
  it('is written by the web alone, and there only in its use and its end', async () => {
    for (const role of ['counterfoil_worker', 'counterfoil_signer'])
      for (const right of ['select', 'insert', 'update', 'delete']) expect(await desk.sql('select has_any_column_privilege($1, \'api_tokens\', \'select\') or has_table_privilege($1, \'api_tokens\', $2) as may', role, right)).toEqual([{ may: false }]);
    const rights = await desk.sql<{ column_name: string }>(`select column_name from information_schema.column_privileges where grantee = 'counterfoil_web' and table_name = 'api_tokens' and privilege_type = 'UPDATE' order by 1`);
    expect(rights.map((r) => r.column_name)).toEqual(['last_used_at', 'revoked_at']);
    expect(await desk.sql(`select has_table_privilege('counterfoil_web', 'api_tokens', 'delete') as may`)).toEqual([{ may: false }]);
  });
});
