import { Server, type IncomingMessage, type ServerResponse } from 'node:http';
import type { Duplex } from 'node:stream';
import { allowedOrigins } from '@/lib/auth/allowed-origins';
import { methodsAt } from './known-addresses';
import { problemBody } from './problem-response';

/**
 * What is turned away before the framework sees it: methods on which the framework breaks, requests
 * for a host that is not ours (a stranger's page can point its own name at our address), and addresses
 * or methods that the interface does not have, which the framework would answer with a page.
 */
export interface Refusal {
  readonly code: 'method-not-allowed' | 'misdirected' | 'not-found';
  readonly status: 404 | 405 | 421;
  readonly sentence: string;
  /** The methods that are there. */
  readonly allow?: string;
}

const METHODS: ReadonlySet<string> = new Set(['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS']);
/** Asked for by load balancers under an address of their own. */
const HEALTH: ReadonlySet<string> = new Set(['/healthz', '/readyz']);

type Asked = Pick<IncomingMessage, 'method' | 'url'> & { readonly host: string | undefined };

export function refusalOf(asked: Asked, hosts: ReadonlySet<string>): Refusal | undefined {
  if (!METHODS.has(asked.method ?? '')) return { code: 'method-not-allowed', status: 405, sentence: `The method ${asked.method} is not answered here.`, allow: [...METHODS].join(', ') };
  if (HEALTH.has(asked.url ?? '')) return undefined;
  if (!hosts.has(asked.host?.toLowerCase() ?? '')) return { code: 'misdirected', status: 421, sentence: `This server answers for ${[...hosts].join(' and ')}, not for the host that was asked.` };
  return beyondInterface(asked.method ?? '', asked.url ?? '');
}

/** Under /api every refusal is a problem document, also for what is not there at all. */
function beyondInterface(method: string, url: string): Refusal | undefined {
  const known = methodsAt(url.split('?')[0] ?? '');
  if (known === 'not-ours' || method === 'OPTIONS') return undefined;
  if (known.length === 0) return { code: 'not-found', status: 404, sentence: 'There is nothing at this address, or nothing you may see.' };
  return known.includes(method) ? undefined : { code: 'method-not-allowed', status: 405, sentence: `The method ${method} is not answered at this address; ${known.join(', ')} ${known.length === 1 ? 'is' : 'are'}.`, allow: known.join(', ') };
}

export const hostsOf = (env: { readonly APP_URL: string; readonly DEMO: boolean }): ReadonlySet<string> =>
  new Set(allowedOrigins(env).map((origin) => new URL(origin).host));

/** The framework owns its server object, so the gate stands where every Node server hands out requests. */
export function installFrontGate(hosts: ReadonlySet<string>): void {
  const emit = Server.prototype.emit as (this: Server, event: string | symbol, ...rest: unknown[]) => boolean;
  Server.prototype.emit = function (this: Server, event: string | symbol, ...rest: unknown[]): boolean {
    if (event === 'clientError') return refuseBroken(rest[0] as NodeJS.ErrnoException, rest[1] as Duplex) || emit.call(this, event, ...rest);
    if (event !== 'request') return emit.call(this, event, ...rest);
    const [request, response] = rest as [IncomingMessage, ServerResponse];
    const refusal = refusalOf({ method: request.method, url: request.url, host: request.headers.host }, hosts);
    if (!refusal) return emit.call(this, event, ...rest);
    refuse(response, refusal, request.url?.startsWith('/api/') === true);
    return true;
  };
}

/** What Node could not parse has no address: it is answered here, and time-outs and overlong heads by Node. */
function refuseBroken({ code }: NodeJS.ErrnoException, socket: Duplex): boolean {
  if (!code?.startsWith('HPE_') || code === 'HPE_HEADER_OVERFLOW' || !socket.writable) return false;
  const body = JSON.stringify(problemBody({ code: 'malformed', sentence: 'The request is not HTTP as we read it, or its method is none that exists.' }));
  const head = ['HTTP/1.1 400 Bad Request', 'content-type: application/problem+json', `content-length: ${Buffer.byteLength(body)}`, `content-security-policy: ${NOTHING}`, 'x-content-type-options: nosniff', 'cache-control: no-store', 'connection: close'];
  socket.end(`${head.join('\r\n')}\r\n\r\n${body}`);
  return true;
}

const NOTHING = "default-src 'none'; frame-ancestors 'none'";

function refuse(response: ServerResponse, { code, status, sentence, allow }: Refusal, asProblem: boolean): void {
  response.writeHead(status, {
    'content-type': asProblem ? 'application/problem+json' : 'text/plain; charset=utf-8',
    ...(allow && { allow }),
    'content-security-policy': NOTHING,
    'x-content-type-options': 'nosniff',
    'referrer-policy': 'same-origin',
    'cross-origin-opener-policy': 'same-origin',
    'cache-control': 'no-store',
    connection: 'close',
  });
  response.end(asProblem ? JSON.stringify(problemBody({ code, sentence })) : `${sentence}\n`);
}
