import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { BlobWriter, TextReader, ZipWriter } from '@zip.js/zip.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase, useDatabase, closeDatabase } from '@/db/client';
import { problemDocumentSchema } from '@/lib/services/problem-schema';
import { createAccount } from '@/lib/services/accounts/create-account';
import { createToken } from '@/lib/services/tokens/create-token';
import { startApplication, type TestApplication } from '../support/application';
import { burstFiles, burstSheet } from '../support/burst-sheet';
import { must } from '../support/service-desk';

/** The example that readers copy, run as they would run it: bash and curl against the running application. */
let app: TestApplication;
let folder: string;
let token = '';

beforeAll(async () => {
  app = await startApplication();
  folder = mkdtempSync(path.join(tmpdir(), 'counterfoil-example-'));
  useDatabase(openDatabase(app.database.webUrl));
  const userId = await createAccount({ email: 'author@larkfield.example', password: 'seven quiet herons', name: 'T. Marrable', role: 'member', affiliation: null });
  token = must(await createToken({ kind: 'member', userId, name: 'T. Marrable', accountRole: 'member' }, { name: 'the example', scopes: ['read', 'draft', 'lodge'], days: 7 })).token;
});
afterAll(async () => {
  await closeDatabase();
  await app?.stop();
  rmSync(folder, { recursive: true, force: true });
});

function run(script: string): Promise<{ readonly code: number | null; readonly out: string }> {
  // A socket as standard input makes bash take itself for a remote shell and read its start-up file.
  const bash = spawn('bash', ['--norc', '--noprofile', '-c', script], { stdio: ['ignore', 'pipe', 'pipe'], cwd: folder, env: { NODE_ENV: 'test', PATH: process.env['PATH'] ?? '', COUNTERFOIL_URL: app.url, COUNTERFOIL_TOKEN: token } });
  let out = '';
  for (const stream of [bash.stdout, bash.stderr]) stream.on('data', (chunk: Buffer) => (out += chunk.toString()));
  return new Promise((resolve) => bash.once('close', (code) => resolve({ code, out })));
}

describe('the worked example of the interface', () => {
  it('makes a submission from an archive, checks it, reads what was found and lodges it', async () => {
    const [, script] = /```bash\n([\s\S]+?)```/.exec(readFileSync('content/interface.md', 'utf8')) ?? [];
    if (!script) throw new Error('content/interface.md has no example');
    const zip = new ZipWriter(new BlobWriter());
    for (const [name, text] of Object.entries({ 'claim.json': JSON.stringify(burstSheet()), ...burstFiles() })) await zip.add(`bursts/${name}`, new TextReader(text));
    writeFileSync(path.join(folder, 'claim.zip'), Buffer.from(await (await zip.close()).arrayBuffer()));
    const { code, out } = await run(script);
    expect(code, `${out}\n${app.log()}`).toBe(0);
    expect(out).toMatch(/draft [0-9a-f-]{36}\n/);
    expect(out).toContain('verdict agrees');
    expect(out).toMatch(/"revision":1,"runId":"[0-9a-f-]{36}"/);
    const id = /draft ([0-9a-f-]{36})/.exec(out)?.[1] ?? '';
    const seen = (await (await fetch(`${app.url}/api/v1/submissions/${id}`, { headers: { authorization: `Bearer ${token}` } })).json()) as { state: string };
    expect(['lodged', 'triage']).toContain(seen.state);
  });
});

describe('over the wire', () => {
  const curl = (...args: string[]) => run(`curl -sS -o body -D headers -w '%{http_code}' ${args.map((a) => `'${a}'`).join(' ')}`);

  it.each([
    ['405', ['-X', 'TRACE', 'http/api/v1/submissions']],
    ['405', ['-X', 'PUT', 'http/api/v1/submissions']],
    ['400', ['-X', 'BREW', 'http/api/v1/submissions']],
    ['405', ['-X', 'POST', '-d', 'x', 'http/api/v1/openapi.json']],
    ['404', ['http/api/v1/nothing']],
    ['404', ['http/api/v1/submissions/%']],
    ['404', ['--path-as-is', 'http/api/v1/submissions/..%2f..%2fx']],
    ['421', ['-H', 'Host: elsewhere.example', 'http/api/v1/submissions']],
    ['401', ['http/api/v1/submissions']],
    ['401', ['-H', 'Authorization: Bearer cf_x', 'http/api/v1/submissions']],
  ] as const)('a refusal is %s and a problem document: %s', async (status, args) => {
    const { out } = await curl(...args.map((a) => a.replace(/^http\//, `${app.url}/`)));
    expect(out).toBe(status);
    expect(readFileSync(path.join(folder, 'headers'), 'utf8')).toMatch(/^content-type: application\/problem\+json\r?$/im);
    const body: unknown = JSON.parse(readFileSync(path.join(folder, 'body'), 'utf8'));
    expect(problemDocumentSchema.parse(body)).toEqual(body);
    const explained = await fetch(`${app.url}${(body as { type: string }).type}`);
    expect(explained.status).toBe(200);
  });

  it('the contract, the schemas and the page for people are there for everybody', async () => {
    for (const [address, type] of [['/api/v1/openapi.json', 'application/json'], ['/schemas/counterfoil-claim/1', 'application/schema+json'], ['/schemas/counterfoil-result/1', 'application/schema+json'], ['/schemas/counterfoil-record/1', 'application/schema+json'], ['/interface', 'text/html']] as const) {
      const answer = await fetch(`${app.url}${address}`);
      expect([answer.status, answer.headers.get('content-type')?.split(';')[0]], address).toEqual([200, type]);
    }
    expect((await fetch(`${app.url}/schemas/counterfoil-claim/2`)).status).toBe(404);
  });
});
