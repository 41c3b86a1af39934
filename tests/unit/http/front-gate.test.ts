import { describe, expect, it } from 'vitest';
import { hostsOf, refusalOf } from '@/lib/http/front-gate';

describe('the gate in front of the framework', () => {
  const team = hostsOf({ APP_URL: 'https://records.example', DEMO: false });
  const demo = hostsOf({ APP_URL: 'http://localhost:3000', DEMO: true });

  it.each(['TRACE', 'CONNECT', 'PROPFIND', undefined])('turns away the method %s', (method) => {
    expect(refusalOf({ method, url: '/', host: 'records.example' }, team)?.status).toBe(405);
  });

  it.each(['attacker.example', 'records.example:8080', 'records.example.attacker.example', '', undefined])(
    'answers for no other host: %s',
    (host) => {
      expect(refusalOf({ method: 'GET', url: '/', host }, team)?.status).toBe(421);
    },
  );

  it('lets its own host in, whatever the case', () => {
    expect(refusalOf({ method: 'GET', url: '/', host: 'Records.Example' }, team)).toBeUndefined();
  });

  it('the demonstration answers to both loopback names', () => {
    for (const host of ['localhost:3000', '127.0.0.1:3000']) expect(refusalOf({ method: 'GET', url: '/', host }, demo)).toBeUndefined();
  });

  it('health is answered under any host, and only health', () => {
    expect(refusalOf({ method: 'GET', url: '/readyz', host: '10.0.0.7:3000' }, team)).toBeUndefined();
    expect(refusalOf({ method: 'GET', url: '/readyz/../admin', host: '10.0.0.7:3000' }, team)?.status).toBe(421);
  });

  const asked = (method: string, url: string) => refusalOf({ method, url, host: 'records.example' }, team);

  it.each([['PUT', '/api/v1/submissions', 'GET, HEAD, POST'], ['DELETE', '/api/v1/records/abc', 'GET, HEAD'], ['POST', '/api/v1/openapi.json?x=1', 'GET, HEAD'], ['GET', '/api/v1/threads/abc/close', 'POST']])('says which methods an address has: %s %s', (method, url, allow) => {
    expect(asked(method, url)).toMatchObject({ status: 405, code: 'method-not-allowed', allow });
  });

  it.each(['/api', '/api/v1', '/api/v1/', '/api/v1/nothing', '/api/v1/submissions/', '/api/v1/submissions/a/b/c/d/e', '/api/v1/submissions/%', '/api/v1/submissions/%E0%A4%A/runs', '/api/v1//submissions'])('knows that %s is no address of the interface', (url) => {
    expect(asked('GET', url)).toMatchObject({ status: 404, code: 'not-found' });
  });

  it.each([['GET', '/api/v1/submissions'], ['HEAD', '/api/v1/submissions?limit=1'], ['POST', '/api/v1/submissions/x/check'], ['OPTIONS', '/api/v1/submissions'], ['GET', '/api/auth/get-session'], ['GET', '/api/health/live'], ['POST', '/compose'], ['GET', '/api/v1/jobs/failed'], ['PATCH', '/api/v1/submissions/x']])('lets %s %s through', (method, url) => {
    expect(asked(method, url)).toBeUndefined();
  });
});
