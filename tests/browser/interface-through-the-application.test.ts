import { createHash, randomBytes } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase } from '@/db/client';
import { createAccount } from '@/lib/services/accounts/create-account';
import type { DraftView, FileView } from '@/lib/services/submissions/submission-view';
import { startApplication, type TestApplication } from '../support/application';
import { BURST_MATCH, burstFiles, burstSheet } from '../support/burst-sheet';

/** Version 1 of the interface, spoken to the running application over the wire. */
const ACCOUNT = { email: 'author@larkfield.example', password: 'seven quiet herons' };
let app: TestApplication;
let cookie: string;

beforeAll(async () => {
  app = await startApplication();
  const web = openDatabase(app.database.webUrl);
  await createAccount({ ...ACCOUNT, name: 'T. Marrable', role: 'member', affiliation: null }, web);
  await web.$client.end();
  const signedIn = await fetch(`${app.url}/api/auth/sign-in/email`, { method: 'POST', headers: { origin: app.url, 'content-type': 'application/json' }, body: JSON.stringify(ACCOUNT) });
  cookie = signedIn.headers.getSetCookie().map((c) => c.split(';')[0]).join('; ');
});
afterAll(() => app.stop());

const ask = (path: string, init: RequestInit = {}, origin = app.url): Promise<Response> => fetch(`${app.url}/api/v1${path}`, { ...init, headers: { cookie, origin, ...(init.headers as Record<string, string> | undefined) } });

function folder(extra: Readonly<Record<string, Buffer>> = {}): FormData {
  const form = new FormData();
  form.append('claim', new Blob([JSON.stringify(burstSheet())], { type: 'application/json' }), 'claim.json');
  for (const [name, text] of Object.entries(burstFiles())) form.append('file', new Blob([text]), name);
  for (const [name, bytes] of Object.entries(extra)) form.append('file', new Blob([new Uint8Array(bytes)]), name);
  return form;
}

async function readEvents(response: Response): Promise<string> {
  let text = '';
  for await (const chunk of response.body as unknown as AsyncIterable<Uint8Array>) text += Buffer.from(chunk).toString();
  return text;
}

describe('the interface of the running application', () => {
  it('takes a folder with 11 MB whole, checks it with live progress, and gives every byte back', async () => {
    const long = randomBytes(11 * 1024 * 1024);
    const made = await ask('/submissions', { method: 'POST', body: folder({ 'long.bin': long }) });
    expect(made.status).toBe(201);
    const { id } = (await made.json()) as { id: string };
    expect((await ask(`/submissions/${id}/check`, { method: 'POST' })).status).toBe(202);
    const events = await ask(`/submissions/${id}/events`);
    if (events.status === 200) expect(await readEvents(events)).toMatch(/"state":"finished"[\s\S]*event: end/);
    const draft = (await (await ask(`/submissions/${id}`)).json()) as DraftView;
    if (draft.check?.run.state !== 'measured') throw new Error(`${JSON.stringify(draft.check)}\n${app.log()}`);
    expect(draft.check.run.result.claims[0]?.points[0]?.value).toAgreeWith(BURST_MATCH, 2e-4);
    const file = draft.revision.files.find((f: FileView) => f.name === 'long.bin');
    const back = await ask(`/submissions/${id}/files/${file?.id}`);
    expect(back.headers.get('content-disposition')).toMatch(/^attachment/);
    expect(createHash('sha256').update(Buffer.from(await back.arrayBuffer())).digest('hex')).toBe(createHash('sha256').update(long).digest('hex'));
  });

  it('takes writes from both names of this machine in the demo, and from nowhere else', async () => {
    for (const origin of app.urls) expect((await ask('/submissions', { method: 'POST', body: folder() }, origin)).status).toBe(201);
    for (const origin of ['https://elsewhere.example', 'null', app.url.replace('http:', 'https:')]) expect((await ask('/submissions', { method: 'POST', body: folder() }, origin)).status).toBe(403);
  });

  it('answers an unknown id, a malformed one and another person’s alike', async () => {
    const { id } = (await (await ask('/submissions', { method: 'POST', body: folder() })).json()) as { id: string };
    const stranger = (path: string) => fetch(`${app.url}/api/v1${path}`).then(async (r) => [r.status, r.headers.get('content-type'), await r.text()]);
    const unknown = await stranger('/submissions/7b0f6a52-6c1c-4c55-9a0f-3a3d1f9f8e11');
    expect(unknown[0]).toBe(404);
    for (const other of [id, 'x', '1']) expect(await stranger(`/submissions/${other}`)).toEqual(unknown);
  });
});
