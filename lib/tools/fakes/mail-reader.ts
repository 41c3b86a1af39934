import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { STYLE, letterPage, listPage, missingPage } from '@/lib/tools/fakes/mail-pages';
import type { MailSink } from '@/lib/tools/fakes/mail-sink';

export interface MailReader {
  readonly url: string;
  stop(): Promise<void>;
}

const HEADERS = {
  'content-security-policy': "default-src 'none'; style-src 'self'; frame-ancestors 'none'; base-uri 'none'; form-action 'none'",
  'x-content-type-options': 'nosniff',
  'referrer-policy': 'no-referrer',
  'cache-control': 'no-store',
};

/** A web page over the sink, for people (list and letter) and for tests (/messages.json). */
export async function startMailReader(sink: MailSink, port = 0): Promise<MailReader> {
  const server = createServer((request, response) => answer(sink, request, response));
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', resolve);
  });
  return {
    url: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    stop: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}

function answer(sink: MailSink, request: IncomingMessage, response: ServerResponse): void {
  // A page on another site could point its own name at loopback; only our two names are served.
  if (!/^(127\.0\.0\.1|localhost)(:\d+)?$/.test(request.headers.host ?? '')) return send(response, 421, 'text/plain', 'unknown host\n');
  if (request.method !== 'GET' && request.method !== 'HEAD') return send(response, 405, 'text/plain', 'read only\n');
  const path = (request.url ?? '/').split('?')[0];
  const letters = sink.messages();
  if (path === '/') return send(response, 200, 'text/html', listPage(letters));
  if (path === '/style.css') return send(response, 200, 'text/css', STYLE);
  if (path === '/messages.json') return send(response, 200, 'application/json', JSON.stringify(letters));
  const letter = letters.find((candidate) => path === `/messages/${candidate.id}`);
  return letter ? send(response, 200, 'text/html', letterPage(letter)) : send(response, 404, 'text/html', missingPage());
}

function send(response: ServerResponse, status: number, type: string, body: string): void {
  response.writeHead(status, { ...HEADERS, 'content-type': `${type}; charset=utf-8` }).end(body);
}
