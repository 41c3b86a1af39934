import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { SignJWT, exportJWK, generateKeyPair, type CryptoKey, type JWK } from 'jose';
import { OpenIdGrants } from '@/lib/tools/fakes/openid-grants';
import { STYLE, choosingPage, refusalPage } from '@/lib/tools/fakes/openid-pages';
import { OPENID_PEOPLE } from '@/lib/tools/fakes/openid-people';

export interface OpenIdProvider {
  readonly issuer: string;
  stop(): Promise<void>;
}

interface Room {
  readonly issuer: string;
  readonly client: { readonly id: string; readonly secret: string };
  readonly key: CryptoKey;
  readonly publicKey: JWK;
  readonly grants: OpenIdGrants;
}

interface Answer {
  readonly status: number;
  readonly type?: string;
  readonly body?: string;
  readonly location?: string;
}

const HEADERS = {
  'content-security-policy': "default-src 'none'; style-src 'self'; frame-ancestors 'none'; base-uri 'none'; form-action 'none'",
  'x-content-type-options': 'nosniff',
  'referrer-policy': 'no-referrer',
  'cache-control': 'no-store',
};
const ALGORITHM = 'RS256';
const json = (status: number, value: unknown): Answer => ({ status, type: 'application/json', body: JSON.stringify(value) });
const html = (status: number, body: string): Answer => ({ status, type: 'text/html', body });

/**
 * Speaks OpenID Connect as ORCID does, on loopback, over a handful of invented people: code flow with
 * PKCE, signed id_token, and no address of anybody. For demonstration and tests only.
 */
export async function startOpenIdProvider(options: { clientId: string; clientSecret: string; port?: number }): Promise<OpenIdProvider> {
  const { publicKey, privateKey } = await generateKeyPair(ALGORITHM);
  const server = createServer();
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(options.port ?? 0, '127.0.0.1', resolve);
  });
  const issuer = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  const jwk = { ...(await exportJWK(publicKey)), kid: 'local', alg: ALGORITHM, use: 'sig' };
  const room: Room = { issuer, client: { id: options.clientId, secret: options.clientSecret }, key: privateKey, publicKey: jwk, grants: new OpenIdGrants() };
  server.on('request', (request, response) => void answer(room, request).then((said) => send(response, said), () => send(response, json(500, { error: 'server_error' }))));
  return {
    issuer,
    stop: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}

function send(response: ServerResponse, { status, type = 'text/plain', body = '', location }: Answer): void {
  response.writeHead(status, { ...HEADERS, 'content-type': `${type}; charset=utf-8`, ...(location && { location }) }).end(body);
}

async function answer(room: Room, request: IncomingMessage): Promise<Answer> {
  // A page on another site could point its own name at loopback; only our two names are served.
  if (!/^(127\.0\.0\.1|localhost)(:\d+)?$/.test(request.headers.host ?? '')) return { status: 421, body: 'unknown host\n' };
  const { pathname, searchParams } = new URL(request.url ?? '/', room.issuer);
  switch (`${request.method} ${pathname}`) {
    case 'GET /.well-known/openid-configuration': return json(200, discovery(room.issuer));
    case 'GET /jwks': return json(200, { keys: [room.publicKey] });
    case 'GET /style.css': return { status: 200, type: 'text/css', body: STYLE };
    case 'GET /authorize': return authorize(room, searchParams);
    case 'POST /token': return token(room, await readForm(request), request.headers.authorization);
    case 'GET /userinfo': return userInfo(room, request.headers.authorization);
    default: return { status: 404, body: 'nothing here\n' };
  }
}

const discovery = (issuer: string) => ({
  issuer,
  authorization_endpoint: `${issuer}/authorize`,
  token_endpoint: `${issuer}/token`,
  userinfo_endpoint: `${issuer}/userinfo`,
  jwks_uri: `${issuer}/jwks`,
  response_types_supported: ['code'],
  subject_types_supported: ['public'],
  id_token_signing_alg_values_supported: [ALGORITHM],
  token_endpoint_auth_methods_supported: ['client_secret_post', 'client_secret_basic'],
  code_challenge_methods_supported: ['S256'],
  scopes_supported: ['openid'],
  claims_supported: ['sub', 'name', 'given_name', 'family_name'],
});

/** Without `person` the choosing page; with one, straight back to where the request came from. */
function authorize(room: Room, asked: URLSearchParams): Answer {
  const redirectUri = asked.get('redirect_uri') ?? '';
  if (asked.get('client_id') !== room.client.id) return html(400, refusalPage('The client that asks is not known here.'));
  if (!isOwnCallback(redirectUri)) return html(400, refusalPage('The way back does not lead to this machine.'));
  const challenge = asked.get('code_challenge');
  const inOrder = asked.get('response_type') === 'code' && asked.get('scope')?.split(' ').includes('openid') && challenge && asked.get('code_challenge_method') === 'S256' && asked.get('state');
  if (!inOrder) return html(400, refusalPage('Expected a code flow for the scope openid, with a state and a challenge by S256.'));
  const chosen = asked.get('person');
  if (chosen === null) return html(200, choosingPage(asked));
  const person = OPENID_PEOPLE.find(({ id }) => id === chosen);
  const outcome: Readonly<Record<string, string>> = person ? { code: room.grants.issueCode(person, { redirectUri, challenge, nonce: asked.get('nonce') }) } : { error: 'access_denied' };
  const back = new URL(redirectUri);
  for (const [name, value] of Object.entries({ ...outcome, state: asked.get('state') ?? '', iss: room.issuer })) back.searchParams.set(name, value);
  return { status: 302, location: back.href };
}

function isOwnCallback(address: string): boolean {
  if (!URL.canParse(address)) return false;
  const { protocol, hostname, pathname } = new URL(address);
  return protocol === 'http:' && ['127.0.0.1', 'localhost'].includes(hostname) && pathname === '/api/auth/callback/orcid';
}

async function token(room: Room, form: URLSearchParams, authorization: string | undefined): Promise<Answer> {
  if (!isClient(room.client, form, authorization)) return json(401, { error: 'invalid_client' });
  if (form.get('grant_type') !== 'authorization_code') return json(400, { error: 'unsupported_grant_type' });
  const redeemed = room.grants.redeem(form.get('code') ?? '', form.get('redirect_uri') ?? '', form.get('code_verifier') ?? '');
  if (!redeemed) return json(400, { error: 'invalid_grant' });
  const { person, nonce, accessToken } = redeemed;
  const idToken = await new SignJWT({ ...claimsOf(person.name), ...(nonce && { nonce }) })
    .setProtectedHeader({ alg: ALGORITHM, kid: 'local' })
    .setIssuer(room.issuer)
    .setSubject(person.id)
    .setAudience(room.client.id)
    .setIssuedAt()
    .setExpirationTime('10m')
    .sign(room.key);
  return json(200, { access_token: accessToken, token_type: 'bearer', expires_in: 600, scope: 'openid', id_token: idToken, orcid: person.id, name: person.name });
}

function isClient({ id, secret }: Room['client'], form: URLSearchParams, authorization: string | undefined): boolean {
  if (form.get('client_id') === id && form.get('client_secret') === secret) return true;
  return authorization === `Basic ${Buffer.from(`${encodeURIComponent(id)}:${encodeURIComponent(secret)}`).toString('base64')}`;
}

function userInfo(room: Room, authorization: string | undefined): Answer {
  const person = room.grants.personOf(/^bearer (\S+)$/i.exec(authorization ?? '')?.[1] ?? '');
  return person ? json(200, { sub: person.id, ...claimsOf(person.name) }) : json(401, { error: 'invalid_token' });
}

function claimsOf(name: string) {
  const [given, ...family] = name.split(' ');
  return { name, given_name: given, family_name: family.join(' ') };
}

async function readForm(request: IncomingMessage): Promise<URLSearchParams> {
  const chunks: Buffer[] = [];
  for await (const chunk of request) chunks.push(chunk as Buffer);
  return new URLSearchParams(Buffer.concat(chunks).toString('utf8'));
}
