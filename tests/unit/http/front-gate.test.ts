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
});
