import { Server, type IncomingMessage, type ServerResponse } from 'node:http';
import { allowedOrigins } from '@/lib/auth/allowed-origins';

/**
 * What is turned away before the framework sees it: methods on which the framework breaks, and
 * requests for a host that is not ours (a stranger's page can point its own name at our address).
 */
export interface Refusal {
  readonly status: 405 | 421;
  readonly sentence: string;
}

const METHODS: ReadonlySet<string> = new Set(['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS']);
/** Asked for by load balancers under an address of their own. */
const HEALTH: ReadonlySet<string> = new Set(['/healthz', '/readyz']);

type Asked = Pick<IncomingMessage, 'method' | 'url'> & { readonly host: string | undefined };

export function refusalOf(asked: Asked, hosts: ReadonlySet<string>): Refusal | undefined {
  if (!METHODS.has(asked.method ?? '')) return { status: 405, sentence: `The method ${asked.method} is not answered here.` };
  if (HEALTH.has(asked.url ?? '') || hosts.has(asked.host?.toLowerCase() ?? '')) return undefined;
  return { status: 421, sentence: `This server answers for ${[...hosts].join(' and ')}, not for the host that was asked.` };
}

export const hostsOf = (env: { readonly APP_URL: string; readonly DEMO: boolean }): ReadonlySet<string> =>
  new Set(allowedOrigins(env).map((origin) => new URL(origin).host));

/** The framework owns its server object, so the gate stands where every Node server hands out requests. */
export function installFrontGate(hosts: ReadonlySet<string>): void {
  const emit = Server.prototype.emit as (this: Server, event: string | symbol, ...rest: unknown[]) => boolean;
  Server.prototype.emit = function (this: Server, event: string | symbol, ...rest: unknown[]): boolean {
    if (event !== 'request') return emit.call(this, event, ...rest);
    const [request, response] = rest as [IncomingMessage, ServerResponse];
    const refusal = refusalOf({ method: request.method, url: request.url, host: request.headers.host }, hosts);
    if (!refusal) return emit.call(this, event, ...rest);
    refuse(response, refusal);
    return true;
  };
}

function refuse(response: ServerResponse, { status, sentence }: Refusal): void {
  response.writeHead(status, {
    'content-type': 'text/plain; charset=utf-8',
    'content-security-policy': "default-src 'none'; frame-ancestors 'none'",
    'x-content-type-options': 'nosniff',
    'referrer-policy': 'same-origin',
    'cross-origin-opener-policy': 'same-origin',
    'cache-control': 'no-store',
    connection: 'close',
  });
  response.end(`${sentence}\n`);
}
