import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase } from '@/db/client';
import type { ResultDocument } from '@/lib/pipeline/result';
import { createAccount } from '@/lib/services/accounts/create-account';
import type { DraftView } from '@/lib/services/submissions/submission-view';
import { startApplication, type TestApplication } from '../support/application';
import { launchBrowser } from '../support/browser';

const SPECIMEN = fileURLToPath(new URL('../../content/specimens/spin-visible/', import.meta.url));
const ACCOUNT = { email: 'author@larkfield.example', password: 'seven quiet herons' };
const claimJson = readFileSync(path.join(SPECIMEN, 'claim.json'));

let app: TestApplication;
let browser: Browser;
let page: Page;
let draft = '';
const onTheConsole: string[] = [];

/** Under the real policy for content: the worker has to live with it. */
async function signedIn(): Promise<{ context: BrowserContext; page: Page }> {
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, reducedMotion: 'reduce' });
  const opened = await context.newPage();
  opened.setDefaultTimeout(45_000);
  opened.on('console', (message) => { if (/Content.Security.Policy/i.test(message.text())) onTheConsole.push(message.text()); });
  opened.on('pageerror', (error) => onTheConsole.push(error.message));
  await opened.goto(`${app.url}/sign-in?next=/submissions`);
  await opened.getByLabel('E-mail').fill(ACCOUNT.email);
  await opened.locator('input[name=password]').fill(ACCOUNT.password);
  await opened.getByRole('button', { name: 'Sign in', exact: true }).click();
  await opened.getByRole('heading', { level: 1, name: 'Your submissions' }).waitFor();
  return { context, page: opened };
}

beforeAll(async () => {
  app = await startApplication();
  const web = openDatabase(app.database.webUrl);
  await createAccount({ ...ACCOUNT, name: 'T. Marrable', role: 'member', affiliation: 'Larkfield Wave Group' }, web);
  await web.$client.end();
  browser = await launchBrowser();
  ({ page } = await signedIn());
});
afterAll(async () => {
  await browser?.close();
  await app?.stop();
});

const saved = (on = page) => on.getByText('Saved', { exact: true }).waitFor();
const previewed = async (): Promise<number[]> => {
  await page.getByRole('region', { name: 'Preview', exact: true }).waitFor({ timeout: 120_000 });
  return page.locator('section[aria-label="Preview"] data').evaluateAll((all) => all.map((one) => Number(one.getAttribute('value'))));
};
const ask = <T>(address: string): Promise<T> => page.evaluate(async (at) => (await fetch(at, { headers: { accept: 'application/json' } })).json() as unknown, address) as Promise<T>;
const undo = () => page.getByRole('button', { name: 'Undo' }).first().click();

describe('the number before upload', { timeout: 300_000 }, () => {
  let seen: number[] = [];

  it('is shown without anything being sent', async () => {
    const sent: string[] = [];
    page.on('request', (request) => { if (request.method() !== 'GET') sent.push(`${request.method()} ${request.url()}`); });
    await page.getByLabel('Claim-sheet folder to look at').setInputFiles(SPECIMEN);
    await page.getByRole('button', { name: 'Look first' }).click();
    seen = await previewed();
    expect(seen).toHaveLength(3);
    expect(seen.every(Number.isFinite)).toBe(true);
    expect(await page.getByText('not assessed in a preview').count()).toBe(3);
    await page.getByText(/nothing was sent\. The server’s run by two routes is what counts/).waitFor();
    expect(sent).toEqual([]);
  });

  it('is the very number that the server’s run calls route A', async () => {
    await page.getByRole('button', { name: 'Make a draft' }).click();
    await page.waitForURL(/\/compose\/[0-9a-f-]{36}$/);
    draft = page.url().slice(-36);
    await page.locator('#check').getByRole('button', { name: 'Check', exact: true }).click();
    await page.locator('#check').getByRole('button', { name: 'Check again' }).waitFor({ timeout: 200_000 });
    const view = await ask<DraftView>(`/api/v1/submissions/${draft}`);
    const result = (view.check?.run as { readonly result?: ResultDocument } | undefined)?.result;
    expect(seen).toEqual(result?.claims[0]?.points.map((point) => point.routes.A));
  });

  it('is the same in the composer, over files that were fetched because the author said so', async () => {
    await page.getByText(/Not in this browser: a\.txt, b\.txt, noise\.txt/).waitFor();
    await page.getByRole('button', { name: /^Fetch 3 files/ }).click();
    await page.getByRole('button', { name: 'Look now' }).click();
    expect(await previewed()).toEqual(seen);
  });
});

describe('a removal', { timeout: 120_000 }, () => {
  it('of a file is taken back by Undo: the same file is in the draft again', async () => {
    const filesNow = async () => (await ask<DraftView>(`/api/v1/submissions/${draft}`)).revision.files;
    const before = await filesNow();
    await page.getByRole('button', { name: 'Remove a.txt' }).click();
    await page.getByRole('button', { name: 'Remove a.txt' }).waitFor({ state: 'detached' });
    expect((await filesNow()).map((f) => f.name)).toEqual(['b.txt', 'noise.txt']);
    await undo();
    await page.getByRole('button', { name: 'Remove a.txt' }).waitFor();
    expect(await filesNow()).toEqual(before);
  });

  it.each([['claim', 'Remove C1', '[name="claims.0.id"]'], ['waveform', 'Remove this waveform', '[name="waveforms.1.name"]'], ['noise curve', 'Remove this curve', '[name="noise.0.name"]']])('of a %s is taken back by Undo', async (_what, button, field) => {
    await page.getByRole('button', { name: button }).last().click();
    await page.locator(field).waitFor({ state: 'detached' });
    await undo();
    await page.locator(field).waitFor();
    await saved();
  });
});

describe('a claim.json', { timeout: 120_000 }, () => {
  it('is added beside what is there, under other names, and taken back by Undo', async () => {
    const other = JSON.parse(claimJson.toString()) as { claims: { settings?: unknown }[] };
    other.claims = other.claims.map((claim) => ({ ...claim, settings: { ...(claim.settings as object), fLowHz: 25 } }));
    await page.getByLabel('claim.json to import').setInputFiles({ name: 'claim.json', mimeType: 'application/json', buffer: Buffer.from(JSON.stringify(other)) });
    await page.getByRole('button', { name: 'Add to this draft' }).click();
    await page.locator('[name="claims.1.id"]').waitFor();
    expect(await page.locator('[name="claims.1.id"]').inputValue()).toBe('C1-2');
    await saved();
    expect((await ask<DraftView>(`/api/v1/submissions/${draft}`)).revision.sheet.claims).toHaveLength(2);
    await undo();
    await page.locator('[name="claims.1.id"]').waitFor({ state: 'detached' });
    await saved();
    await expect.poll(async () => (await ask<DraftView>(`/api/v1/submissions/${draft}`)).revision.sheet.claims.length).toBe(1);
  });

  it('that is none says where, and changes nothing', async () => {
    await page.getByLabel('claim.json to import').setInputFiles({ name: 'claim.json', mimeType: 'application/json', buffer: Buffer.from('{"format":"counterfoil-claim/1",\n}') });
    await page.getByText(/line 2, column/).waitFor();
    await page.getByRole('button', { name: 'Close', exact: true }).first().click();
  });

  it('pasted as a table becomes a sweep, each faulty cell told before it is filled in', async () => {
    await page.getByText('Paste claims from a spreadsheet').click();
    await page.getByLabel('Table', { exact: true }).fill('totalMassMsun;claimed\n60;0.9753(2)\n100;0,9959');
    await page.getByText(/Write a decimal point/).waitFor();
    await page.getByLabel('Table', { exact: true }).fill('totalMassMsun;claimed\n60;0.9753(2)\n100;0.9959');
    await page.getByRole('button', { name: 'Fill in 1 claim' }).click();
    await expect.poll(() => page.locator('[name="claims.1.claimed"]').inputValue()).toBe('0.9753(2); 0.9959');
    expect(await page.locator('[name="claims.1.overValues"]').inputValue()).toBe('60; 100');
    await undo();
    await page.locator('[name="claims.1.id"]').waitFor({ state: 'detached' });
    await saved();
  });
});

describe('without a connection', { timeout: 120_000 }, () => {
  it('the draft is kept here and said so, and is sent when the connection is back', async () => {
    await page.context().setOffline(true);
    await page.getByLabel('Title', { exact: true }).fill('Written on a train');
    await page.getByText('Not saved, kept in this browser').waitFor();
    await page.getByText(/is kept in this browser and is sent when the connection is back/).first().waitFor();
    await page.context().setOffline(false);
    await saved();
    expect((await ask<DraftView>(`/api/v1/submissions/${draft}`)).title).toBe('Written on a train');
  });
});

describe('two who write at once', { timeout: 120_000 }, () => {
  it('see both versions side by side, and nothing is overwritten until one chooses', async () => {
    const other = await signedIn();
    await other.page.goto(`${app.url}/compose/${draft}`);
    await other.page.getByLabel('Title', { exact: true }).waitFor();
    await page.getByLabel('Title', { exact: true }).fill('The first one’s title');
    await saved();
    await other.page.getByLabel('Title', { exact: true }).fill('The second one’s title');
    await other.page.getByRole('button', { name: 'Compare both' }).click();
    const row = other.page.getByRole('row', { name: /^Title/ });
    expect((await row.innerText()).replace(/\s+/g, ' ')).toBe('Title The second one’s title The first one’s title');
    expect((await ask<DraftView>(`/api/v1/submissions/${draft}`)).title).toBe('The first one’s title');
    await other.page.getByRole('button', { name: 'Keep mine' }).click();
    await saved(other.page);
    expect((await ask<DraftView>(`/api/v1/submissions/${draft}`)).title).toBe('The second one’s title');
    await other.context.close();
    await page.reload();
    await expect.poll(() => page.getByLabel('Title', { exact: true }).inputValue()).toBe('The second one’s title');
  });
});

describe('a long upload', { timeout: 180_000 }, () => {
  const line = '0.000000001 1.000000001 2.000000001\n';
  const bytes = Buffer.from(line.repeat(Math.ceil((18 * 1024 * 1024) / line.length)));
  const long = { name: 'long.txt', mimeType: 'text/plain', buffer: bytes };

  it('that was cut in the middle goes on after a reload, with the same file alone, and sends only the rest', async () => {
    const puts: string[] = [];
    page.on('request', (request) => { if (request.method() === 'PUT') puts.push(request.url().split('/').at(-1) ?? ''); });
    await page.route('**/parts/1', (route) => route.abort('connectionreset'));
    await page.getByLabel('Files to add').setInputFiles(long);
    await page.getByText(/long\.txt: waiting for the connection; 1 of 3 parts are here/).waitFor();
    await page.reload();
    await page.unroute('**/parts/1');
    puts.length = 0;
    await page.getByText('1 of 3 parts of long.txt are here').waitFor();
    const again = page.getByLabel('long.txt, to go on with its upload');
    await again.setInputFiles({ ...long, buffer: Buffer.concat([Buffer.from('9'), bytes.subarray(1)]) });
    await page.getByText(/long\.txt is another file/).waitFor();
    expect(puts).toEqual([]);
    await again.setInputFiles(long);
    await page.getByRole('button', { name: 'Remove long.txt' }).waitFor({ timeout: 90_000 });
    expect(puts).toEqual(['1', '2']);
    const file = (await ask<DraftView>(`/api/v1/submissions/${draft}`)).revision.files.find((f) => f.name === 'long.txt');
    expect(file?.sha256).toBe(createHash('sha256').update(bytes).digest('hex'));
    await expect.poll(() => page.getByText('1 of 3 parts of long.txt are here').count()).toBe(0);
  });
});

describe('an earlier submission', { timeout: 120_000 }, () => {
  it('is duplicated from the list, with its files', async () => {
    await page.goto(`${app.url}/submissions`);
    await page.getByRole('button', { name: /^Duplicate / }).first().click();
    await page.waitForURL(/\/compose\/[0-9a-f-]{36}$/);
    await page.getByRole('heading', { level: 1, name: 'Copy of The second one’s title' }).waitFor();
    await page.getByRole('button', { name: 'Remove long.txt' }).waitFor();
  });

  it('lends its noise curve, file and all, to an empty draft', async () => {
    await page.goto(`${app.url}/submissions`);
    await page.getByRole('button', { name: 'New submission' }).click();
    await page.getByRole('heading', { level: 1, name: 'Untitled draft' }).waitFor();
    await page.getByRole('button', { name: 'From an earlier submission' }).click();
    await page.getByRole('button', { name: /^Take over noise curve S of/ }).first().click();
    await page.locator('[name="noise.0.name"]').waitFor();
    await page.getByRole('button', { name: 'Remove noise.txt' }).waitFor();
    await saved();
    expect(await page.locator('[name="noise.0.file"]').inputValue()).toBe('noise.txt');
  });
});

describe('the keyboard', { timeout: 120_000 }, () => {
  const focused = () => page.evaluate(() => document.activeElement?.closest('tr')?.rowIndex ?? null);

  it('walks the list, never while something is typed, and not at all once it is switched off', async () => {
    await page.goto(`${app.url}/submissions`);
    await page.getByRole('table', { name: 'Your submissions' }).waitFor();
    await page.keyboard.press('j');
    expect(await focused()).toBe(1);
    await page.keyboard.press('j');
    await page.keyboard.press('ArrowDown');
    expect(await focused()).toBe(3);
    await page.keyboard.press('k');
    expect(await focused()).toBe(2);
    await page.keyboard.press('?');
    await page.getByRole('dialog', { name: 'Keys' }).waitFor();
    await page.getByLabel('These keys are on in this browser').uncheck();
    await page.keyboard.press('Escape');
    await page.getByRole('dialog').waitFor({ state: 'detached' });
    await page.reload();
    await page.getByRole('button', { name: 'Keyboard' }).waitFor();
    await page.keyboard.press('j');
    expect(await focused()).toBeNull();
    await page.getByRole('button', { name: 'Keyboard' }).click();
    await page.getByLabel('These keys are on in this browser').check();
    await page.keyboard.press('Escape');
    await page.getByRole('dialog').waitFor({ state: 'detached' });
    await page.goto(`${app.url}/compose/${draft}`);
    const title = page.getByLabel('Title', { exact: true });
    await page.waitForFunction(() => Object.keys(document.getElementsByName('title')[0] ?? {}).some((key) => key.startsWith('__reactProps')));
    await title.fill('');
    await title.pressSequentially('jk?');
    expect(await title.inputValue()).toBe('jk?');
    await page.getByRole('dialog').waitFor({ state: 'detached' });
  });

  it('nothing of all this met the policy for content, or threw', () => expect(onTheConsole).toEqual([]));
});
