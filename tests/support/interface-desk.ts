import { readdirSync } from 'node:fs';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { expect } from 'vitest';
import type { z } from 'zod';
import { OPERATIONS } from '@/lib/http/contract/operations';
import { openApiDocument } from '@/lib/http/openapi-document';
import type { Operation } from '@/lib/http/operation';
import { serveAuth } from '@/lib/http/serve-auth';
import type { AccountRole } from '@/lib/policy/account-role';
import type { SignedInActor } from '@/lib/policy/actor';
import type { TokenScope } from '@/lib/policy/token-scopes';
import { createAccount } from '@/lib/services/accounts/create-account';
import { problemDocumentSchema } from '@/lib/services/problem-schema';
import { createToken } from '@/lib/services/tokens/create-token';
import { must, ORIGIN } from './service-desk';

/** The doors of the interface, asked as a script or a page would; every answer is held to the contract. */
export type DoorName = (typeof OPERATIONS)[number]['door'];
type Handler = (request: Request, context: { params: Promise<Record<string, string | string[]>> }) => Promise<Response>;

export interface Ask {
  /** Headers that say who asks: `bearer(token)` or `session(cookie)`. */
  readonly as?: Readonly<Record<string, string>>;
  readonly params?: Readonly<Record<string, string>>;
  readonly search?: string;
  readonly json?: unknown;
  /** A body as it stands: text with its type among the headers, or a form. */
  readonly raw?: BodyInit;
  readonly headers?: Readonly<Record<string, string>>;
}

export const bearer = (token: string): Record<string, string> => ({ authorization: `Bearer ${token}` });
export const session = (cookie: string): Record<string, string> => ({ cookie, origin: ORIGIN });

export const contractOf = (door: DoorName): Operation<unknown, unknown, unknown> => {
  const found = (OPERATIONS as readonly Operation<unknown, unknown, unknown>[]).find((o) => o.door === door);
  if (!found) throw new Error(`${door} is not in the contract`);
  return found;
};

export async function loadHandlers(): Promise<ReadonlyMap<string, Handler>> {
  const found = new Map<string, Handler>();
  const files = readdirSync('app/api/v1', { recursive: true, encoding: 'utf8' }).filter((f) => f.endsWith('route.ts'));
  for (const file of files) {
    const address = `/api/v1/${path.dirname(file)}`.replace(/\[(\w+)\]/g, '{$1}').replace(/\/\.$/, '');
    const module = (await import(pathToFileURL(path.resolve('app/api/v1', file)).href)) as Record<string, unknown>;
    for (const method of ['GET', 'POST', 'PUT', 'PATCH', 'DELETE']) if (module[method]) found.set(`${method} ${address}`, module[method] as Handler);
  }
  return found;
}

/** Asks a door and holds the answer to what the OpenAPI document promises: status, media type, shape. */
export async function askDoor(handlers: ReadonlyMap<string, Handler>, door: DoorName, { as = {}, params = {}, search = '', json, raw, headers = {} }: Ask = {}): Promise<Response> {
  const handler = handlers.get(door);
  if (!handler) throw new Error(`no route for ${door}`);
  const [method = '', address = ''] = door.split(' ');
  const url = `${ORIGIN}${address.replace(/\{(\w+)\}/g, (_, name: string) => encodeURIComponent(params[name] ?? 'x'))}${search}`;
  const body = json === undefined ? raw : JSON.stringify(json);
  const init = { method, headers: { ...(json === undefined ? {} : { 'content-type': 'application/json' }), ...as, ...headers }, ...(body === undefined ? {} : { body }) };
  const named = Object.fromEntries([...address.matchAll(/\{(\w+)\}/g)].map(([, name = '']) => [name, params[name] ?? 'x']));
  const answer = await handler(new Request(url, init), { params: Promise.resolve(named) });
  // A stream of events is the caller's to read.
  await holdToContract(door, answer.headers.get('content-type')?.startsWith('text/event-stream') ? answer : answer.clone());
  return answer;
}

async function holdToContract(door: DoorName, answer: Response): Promise<void> {
  const [method = '', address = ''] = door.split(' ');
  const documented = openApiDocument().paths?.[address]?.[method.toLowerCase() as 'get']?.responses ?? {};
  const where = `${door} answered ${answer.status}`;
  expect(answer.status, where).toBeLessThan(500);
  expect(Object.keys(documented), where).toContain(String(answer.status));
  if (answer.status >= 400) {
    expect(answer.headers.get('content-type'), where).toBe('application/problem+json');
    exactly(problemDocumentSchema, await answer.json(), where);
    return;
  }
  const { answer: schema, media } = contractOf(door);
  if (answer.status === 304 || answer.status === 204) return;
  expect(answer.headers.get('content-type'), where).toContain(media ?? 'application/json');
  if (schema) exactly(schema, await answer.json(), where);
}

/** Fits the schema, and has no field that the schema does not name. */
function exactly(schema: z.ZodType, body: unknown, where: string): void {
  const parsed = schema.safeParse(body);
  if (!parsed.success) throw new Error(`${where}: ${JSON.stringify(parsed.error.issues).slice(0, 600)}`);
  expect(parsed.data, where).toEqual(body);
}

export interface Person extends Record<string, unknown> {
  readonly actor: SignedInActor;
  readonly cookie: string;
}

/** Somebody with an account and a session of their own. */
export async function signedIn(name: string, group: string, role: AccountRole = 'member'): Promise<Person> {
  const account = { email: `${name.toLowerCase().replace(/[^a-z]+/g, '-')}@${group}.example`, password: 'seven quiet herons' };
  const userId = await createAccount({ ...account, name, role, affiliation: group });
  const answer = await serveAuth(new Request(`${ORIGIN}/api/auth/sign-in/email`, { method: 'POST', headers: { origin: ORIGIN, 'content-type': 'application/json' }, body: JSON.stringify(account) }));
  const cookie = answer.headers.getSetCookie().map((c) => c.split(';')[0]).join('; ');
  return { actor: { kind: 'member', userId, name, accountRole: role }, cookie };
}

export const tokenFor = async ({ actor }: { readonly actor: SignedInActor }, ...scopes: TokenScope[]): Promise<string> => must(await createToken(actor, { name: `for ${scopes.join(', ')}`, scopes, days: 7 })).token;
