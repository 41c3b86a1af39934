import { request as httpRequest } from 'node:http';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApplication, type TestApplication } from '../../support/application';
import { launchBrowser } from '../../support/browser';

interface Answer {
  readonly status: number;
  readonly headers: Readonly<Record<string, string | string[] | undefined>>;
}

/** fetch refuses TRACE and a foreign Host header, so the request is made by hand. */
function ask(url: string, path: string, options: { method?: string; host?: string } = {}): Promise<Answer> {
  const { hostname, port, host } = new URL(url);
  return new Promise((resolve, reject) => {
    const request = httpRequest(
      { hostname, port, path, method: options.method ?? 'GET', headers: { host: options.host ?? host } },
      (response) => {
        response.resume();
        resolve({ status: response.statusCode ?? 0, headers: response.headers });
      },
    );
    request.on('error', reject);
    request.end();
  });
}

describe('every response carries the security headers', () => {
  let application: TestApplication;
  beforeAll(async () => {
    application = await startApplication();
  });
  afterAll(() => application?.stop());

  it.each([
    ['/', 200],
    ['/no-such-page', 404],
    ['/api/no-such-route', 404],
    ['/_next/static/no-such-file.js', 404],
    ['/%E0%A4%A', 404],
    ['/healthz', 200],
    ['/readyz', 200],
  ])('%s answers %i', async (path, status) => {
    const { status: seen, headers } = await ask(application.url, path);
    expect(seen).toBe(status);
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(headers['referrer-policy']).toBe('same-origin');
    expect(headers['cross-origin-opener-policy']).toBe('same-origin');
    expect(headers['x-powered-by']).toBeUndefined();
    const policy = String(headers['content-security-policy']);
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy.split('; ').find((rule) => rule.startsWith('script-src ')) ?? policy).not.toMatch(/unsafe-(inline|eval)/);
  });

  it('two pages never share a nonce', async () => {
    const nonces = await Promise.all(
      [1, 2, 3].map(async () => /'nonce-([^']+)'/.exec(String((await ask(application.url, '/')).headers['content-security-policy']))?.[1]),
    );
    expect(new Set(nonces).size).toBe(3);
    expect(nonces.every((nonce) => (nonce ?? '').length >= 22)).toBe(true);
  });

  it.each([
    ['TRACE', undefined, 405],
    ['GET', 'attacker.example', 421],
  ])('%s for host %s is turned away with %i', async (method, host, status) => {
    expect((await ask(application.url, '/', { method, host })).status).toBe(status);
  });

  it('both loopback names are served, and the front page runs without a word on the console', async () => {
    const browser = await launchBrowser();
    try {
      for (const url of application.urls) {
        const page = await browser.newPage();
        const complaints: string[] = [];
        page.on('console', (message) => ['error', 'warning'].includes(message.type()) && complaints.push(message.text()));
        page.on('pageerror', (error) => complaints.push(error.message));
        const response = await page.goto(url, { timeout: 90_000 });
        await page.waitForLoadState('networkidle', { timeout: 90_000 });
        expect(response?.status()).toBe(200);
        expect(complaints).toEqual([]);
        await page.close();
      }
    } finally {
      await browser.close();
    }
  });
});
