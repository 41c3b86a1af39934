import { generateKeyPairSync } from 'node:crypto';
import type { Browser, BrowserContext, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { openDatabase } from '@/db/client';
import { canonicalJson, sha256Hex } from '@/lib/badges/canonical-json';
import type { RecordDocument } from '@/lib/badges/record';
import { keyIdOf, signRecord } from '@/lib/badges/signature';
import type { ResultDocument } from '@/lib/pipeline/result';
import { createAccount } from '@/lib/services/accounts/create-account';
import type { SubmissionView } from '@/lib/services/submissions/submission-view';
import { accessibilityFaults } from '../support/accessibility';
import { startApplication, type TestApplication } from '../support/application';
import { launchBrowser } from '../support/browser';
import { burstFiles, burstSheet } from '../support/burst-sheet';

const PASSWORD = 'seven quiet herons';
const PEOPLE = { author: 'T. Marrable', referee: 'S. Vasterling', reader: 'N. Brackwater' } as const;
type Who = keyof typeof PEOPLE;
let app: TestApplication;
let browser: Browser;
const contexts = {} as Record<Who, BrowserContext>;
const pages = {} as Record<Who, Page>;
const ids = {} as Record<Who, string>;
const RECORD = '44aa-00bb';
const DECISION = '3f0c1c1e-7d0b-4b60-9b52-5d8f3a6f7c11';
const onTheConsole: string[] = [];
let id: string;

const LOUDNESS = { id: 'C2', quantity: 'snr', of: { a: 'A' }, noise: 'W', settings: { fLowHz: 10, fHighHz: 1900, taper: 'none' }, claimed: '5.9', tolerance: 0.02 };
const ask = (who: Who, where: string, init: { method?: string; multipart?: FormData; headers?: Record<string, string> } = {}) =>
  contexts[who].request.fetch(`${app.url}/api/v1${where}`, { ...init, headers: { origin: app.url, ...init.headers } });
const mine = async (): Promise<SubmissionView> => (await (await ask('author', `/submissions/${id}`)).json()) as SubmissionView;
const owner = async (text: string, ...values: unknown[]): Promise<void> => {
  const database = openDatabase(app.database.ownerUrl);
  await database.$client.query(text, values);
  await database.$client.end();
};

async function checkedDraft(): Promise<void> {
  const form = new FormData();
  const sheet = burstSheet();
  form.append('claim', new Blob([JSON.stringify({ ...sheet, claims: [...sheet.claims, LOUDNESS] })], { type: 'application/json' }), 'claim.json');
  for (const [name, text] of Object.entries(burstFiles())) form.append('file', new Blob([text]), name);
  id = ((await (await ask('author', '/submissions', { method: 'POST', multipart: form })).json()) as { id: string }).id;
  expect((await ask('author', `/submissions/${id}/check`, { method: 'POST' })).status()).toBe(202);
  await vi.waitUntil(async () => { const now = await mine(); return now.kind === 'draft' && now.check?.run.state === 'measured'; }, { timeout: 90_000, interval: 300 });
}

async function enter(who: Who): Promise<void> {
  const email = `${who}@larkfield.example`;
  const web = openDatabase(app.database.webUrl);
  await createAccount({ email, password: PASSWORD, name: PEOPLE[who], role: 'member', affiliation: 'Larkfield Wave Group' }, web);
  await web.$client.end();
  contexts[who] = await browser.newContext({ viewport: { width: 1440, height: 900 }, reducedMotion: 'reduce' });
  expect((await contexts[who].request.post(`${app.url}/api/auth/sign-in/email`, { data: { email, password: PASSWORD }, headers: { origin: app.url } })).ok()).toBe(true);
  const owners = openDatabase(app.database.ownerUrl);
  ids[who] = ((await owners.$client.query<{ id: string }>('select id from users where email = $1', [email])).rows[0]?.id) ?? '';
  await owners.$client.end();
  const page = await contexts[who].newPage();
  page.setDefaultTimeout(45_000);
  page.on('console', (message) => { if (message.type() === 'error') onTheConsole.push(`${message.text()} ${message.location().url}`); });
  page.on('pageerror', (error) => onTheConsole.push(error.message));
  pages[who] = page;
}

beforeAll(async () => {
  app = await startApplication();
  browser = await launchBrowser();
  for (const who of Object.keys(PEOPLE) as Who[]) await enter(who);
  await checkedDraft();
}, 300_000);
afterAll(async () => {
  await browser?.close();
  await app?.stop();
});

const form = (on: Page, claim: string): Locator => on.getByRole('form', { name: `Variation of ${claim}` });
const rowOf = (on: Page, claim: string, words: RegExp): Locator => on.getByRole('table', { name: `Your variations of ${claim}` }).getByRole('row', { name: words });
const compute = (on: Page, claim: string): Promise<void> => form(on, claim).getByRole('button', { name: 'Compute the variation' }).click();
const isWider = (on: Page) => on.evaluate(() => document.documentElement.scrollWidth > window.innerWidth);

/** Nothing wider than the window and nothing that axe names, in three widths and both themes. */
async function expectWhole(on: Page, within?: string): Promise<void> {
  for (const [width, colorScheme] of [[1440, 'light'], [1024, 'dark'], [390, 'light']] as const) {
    await on.setViewportSize({ width, height: 900 });
    await on.emulateMedia({ colorScheme });
    expect(await isWider(on), `${width}`).toBe(false);
    expect(await accessibilityFaults(on, within), `${width} ${colorScheme}`).toEqual([]);
  }
  await on.setViewportSize({ width: 1440, height: 900 });
  await on.emulateMedia({ colorScheme: 'light' });
}

describe('the author, on a draft', { timeout: 300_000 }, () => {
  it('finds the form filled by the address, and what of one cannot be read', async () => {
    const page = pages.author;
    await page.goto(`${app.url}/compose/${id}?vary=C1&settings=${encodeURIComponent('{"fLowHz":-1}')}`);
    await form(page, 'C1').getByText('a number above 0').waitFor();
    await page.goto(`${app.url}/compose/${id}?vary=C1&settings=${encodeURIComponent('{"fLowHz":30}')}&mask=0.2,0.3`);
    expect(await form(page, 'C1').getByLabel('fLowHz, Hz').inputValue()).toBe('30');
    expect(await form(page, 'C1').getByLabel('From', { exact: true }).inputValue()).toBe('0.2');
    await form(page, 'C1').getByText('declared 10 Hz').waitFor();
  });

  it('is told a factor at once, for a setting and for a reading, before anything runs', async () => {
    const page = pages.author;
    await page.goto(`${app.url}/compose/${id}?vary=C2`);
    await form(page, 'C2').getByLabel('Change a setting').selectOption('detectors');
    await form(page, 'C2').getByLabel(/^Detectors/).fill('4');
    await form(page, 'C2').getByText('by the factor 2 on the checked number').waitFor();
    await form(page, 'C2').getByRole('button', { name: 'Leave Detectors as it is' }).click();
    await form(page, 'C2').getByLabel('Read a convention otherwise').selectOption('C02:quieter');
    await form(page, 'C2').getByText('by the factor 0.707107 on the checked number').waitFor();
    await form(page, 'C2').getByText('Reading: as if the spectrum is doubled as if it were two-sided').waitFor();
    expect(await page.getByRole('table', { name: 'Your variations of C2' }).count()).toBe(0);
    // The composer around it has a test of its own.
    await expectWhole(page, 'section[aria-labelledby="reading-h"]');
  });

  it('asks by keyboard alone for another curve, and sees the rerun go on to its number beside the checked one', async () => {
    const page = pages.author;
    await page.goto(`${app.url}/compose/${id}?vary=C1&settings=${encodeURIComponent('{"fLowHz":30}')}`);
    await form(page, 'C1').getByLabel('Noise curve').selectOption('G2');
    await form(page, 'C1').getByLabel('Note').fill('Does another curve explain it?');
    await form(page, 'C1').getByRole('button', { name: 'Compute the variation' }).focus();
    await page.keyboard.press('Enter');
    const row = rowOf(page, 'C1', /lower cut-off 30 Hz/);
    // It waits for a worker, or is under way, or done already: never an empty cell.
    expect(await row.innerText()).toMatch(/waiting|under way|fetching|C1: |±/);
    await row.getByText('±').waitFor({ timeout: 60_000 });
    expect(await row.innerText()).toMatch(/noise curve G2, built in[\s\S]*Does another curve explain it\?[\s\S]*you alone/);
    await row.getByRole('link').click();
    await page.getByRole('heading', { name: 'C1, Match, varied' }).waitFor();
    expect(await page.getByRole('table', { name: 'C1: checked and varied numbers' }).innerText()).toMatch(/±[\s\S]*±[\s\S]*T/);
    const figure = page.locator('figure').filter({ hasText: ', varied' }).first();
    await figure.waitFor();
    expect(await figure.locator('figcaption svg path[stroke-dasharray]').count()).toBeGreaterThan(0);
    await expectWhole(page);
  });

  it('is refused in a sentence where the sheet would be, and nothing typed is lost', async () => {
    const page = pages.author;
    await page.goto(`${app.url}/compose/${id}?vary=C2`);
    await form(page, 'C2').getByLabel('Change a setting').selectOption('detectors');
    await form(page, 'C2').getByLabel(/^Detectors/).fill('44');
    await compute(page, 'C2');
    await form(page, 'C2').getByText('a whole number from 1 to 10').first().waitFor();
    expect(await form(page, 'C2').getByLabel(/^Detectors/).inputValue()).toBe('44');
  });
});

describe('the referee, in review', { timeout: 300_000 }, () => {
  it('reads an input otherwise, alone, and attaches what came of it to a comment', async () => {
    await ask('author', `/submissions/${id}/lodge`, { method: 'POST', headers: { 'if-match': (await ask('author', `/submissions/${id}`)).headers()['etag'] ?? '' } });
    await vi.waitUntil(async () => (await mine()).state === 'triage', { timeout: 90_000, interval: 300 });
    await owner(`insert into invitations (submission_id, referee_id, invited_by, slot, state, answered_at) values ($1, $2, $2, 'C', 'accepted', now())`, id, ids.referee);
    await owner(`update submissions set state = 'in-review', round = 1 where id = $1`, id);
    const page = pages.referee;
    await page.goto(`${app.url}/review/${id}?vary=C2`);
    await form(page, 'C2').getByLabel('Read a convention otherwise').selectOption('C01:root');
    await compute(page, 'C2');
    const row = rowOf(page, 'C2', /used as if it were the power density/);
    await row.getByText('±').waitFor({ timeout: 60_000 });
    expect(await row.innerText()).toContain('you alone');
    const address = await row.getByRole('link').getAttribute('href');
    await pages.author.goto(`${app.url}${address ?? ''}`);
    await pages.author.getByRole('heading', { name: 'Nothing here' }).waitFor();
    await page.getByText('Comment on C2').click();
    await page.getByLabel('Comment', { exact: true }).last().fill('Is the column an amplitude?');
    await page.getByLabel('Attach a variation').last().selectOption({ index: 1 });
    await page.getByRole('button', { name: 'Open the thread' }).last().click();
    await page.getByRole('article', { name: 'Thread 1' }).getByText('Variation:').waitFor();
    await pages.author.goto(`${app.url}${address ?? ''}`);
    await pages.author.getByRole('heading', { name: 'C2, Optimal SNR, varied' }).waitFor();
    expect(await pages.author.locator('main').innerText()).not.toContain(PEOPLE.referee);
    await expectWhole(pages.author);
  });
});

/** A record of the official run, signed with a key of its own: what leads to one is another test's. */
async function plantRecord(): Promise<void> {
  const database = openDatabase(app.database.ownerUrl);
  const query = <T>(text: string, ...values: unknown[]): Promise<{ rows: T[] }> => database.$client.query(text, values) as unknown as Promise<{ rows: T[] }>;
  const { privateKey, publicKey } = generateKeyPairSync('ed25519');
  const { rows: [run] } = await query<{ id: string; result: ResultDocument; digest: string }>(`select r.id, o.result, o.result_digest as digest from runs r join run_results o on o.run_id = r.id where r.kind = 'official'`);
  if (!run) throw new Error('there is no official run');
  const document: RecordDocument = {
    format: 'counterfoil-record/1', domain: app.url, id: RECORD, title: run.result.title, authors: [PEOPLE.author], revision: 1, enteredAt: '2026-11-14', lapsesAt: '2031-11-14',
    decision: { by: 'R. Amsel', role: 'editor', on: '2026-11-14', level: 1, remarks: [], reports: 1 }, engine: run.result.engine,
    claims: run.result.claims.map(({ candidates: _candidates, search: _search, ...claim }) => ({ ...claim, covered: true })), files: run.result.files,
    sheetDigest: run.digest, resultDigest: run.digest, cautions: [], supersedes: null, keyId: keyIdOf(publicKey), logIndex: null,
  };
  const text = canonicalJson(document);
  await query(`insert into signing_keys (id, public_key) values ($1, $2)`, document.keyId, publicKey.export({ type: 'spki', format: 'pem' }));
  await query(`insert into decisions (id, submission_id, round, revision, kind, level, run_id, letter, decided_by) values ($1, $2, 1, 1, 'enter', 1, $3, '{"prose":"It stands as printed.","numbers":[],"points":[]}', $4)`, DECISION, id, run.id, ids.reader);
  await query(`insert into records (id, submission_id, decision_id, revision, level, document, signature, document_digest, key_id) values ($1, $2, $3, 1, 1, $4, $5, $6, $7)`, RECORD, id, DECISION, Buffer.from(text), Buffer.from(JSON.stringify(signRecord(text, privateKey))), sha256Hex(text), document.keyId);
  await query(`insert into record_standings (record_id, standing, reason) values ($1, 'entered', '')`, RECORD);
  await query(`update submissions set state = 'entered' where id = $1`, id);
  await database.$client.end();
}

describe('a reader, on a record', { timeout: 300_000 }, () => {
  it('varies it, opens the link to whoever has it, and shuts it again', async () => {
    await plantRecord();
    const page = pages.reader;
    await page.goto(`${app.url}/records/${RECORD}?vary=C1&settings=${encodeURIComponent('{"fLowHz":50}')}`);
    await compute(page, 'C1');
    const row = rowOf(page, 'C1', /lower cut-off 50 Hz/);
    await row.getByText('±').waitFor({ timeout: 60_000 });
    await row.getByRole('link').click();
    await page.getByRole('button', { name: 'Let whoever has the link read it' }).click();
    await page.getByText('Seen by whoever has the link.').waitFor();
    const visitor = await (await browser.newContext({ reducedMotion: 'reduce' })).newPage();
    await visitor.goto(page.url());
    expect(await visitor.getByRole('table', { name: 'C1: official and varied numbers' }).innerText()).toContain('±');
    expect(await visitor.locator('main').innerText()).not.toContain(PEOPLE.reader);
    await page.getByRole('button', { name: 'Shut it again' }).click();
    await page.getByText('Seen by you alone.').waitFor();
    await visitor.goto(page.url());
    await visitor.waitForURL(/\/sign-in\?next=/);
    await visitor.context().close();
  });

  it('keeps what was entered without a connection, and is told when those of the day are spent', async () => {
    const page = pages.reader;
    const address = `${app.url}/records/${RECORD}?vary=C1&settings=${encodeURIComponent('{"fLowHz":60}')}`;
    await page.goto(address);
    await form(page, 'C1').waitFor();
    await contexts.reader.setOffline(true);
    await form(page, 'C1').getByText('No connection. What you entered stays here.').waitFor();
    expect(await form(page, 'C1').getByLabel('fLowHz, Hz').inputValue()).toBe('60');
    await contexts.reader.setOffline(false);
    await owner(`insert into runs (submission_id, revision_id, kind, engine, sheet, inputs, inputs_digest) select submission_id, revision_id, 'variation', engine, sheet, inputs, inputs_digest from runs, generate_series(1, 9) where kind = 'official'`);
    await owner(`insert into variations (run_id, submission_id, revision_id, claim_id, changes, requested_by) select id, submission_id, revision_id, 'C9', '{"settings":{"fLowHz":20}}', $1 from runs r where kind = 'variation' and not exists (select 1 from variations v where v.run_id = r.id)`, ids.reader);
    await page.goto(address);
    await page.getByText('Those of today are used up').first().waitFor();
    expect(await form(page, 'C1').count()).toBe(0);
    expect(await accessibilityFaults(page)).toEqual([]);
  });

  it('leaves nothing on the console', () => {
    expect(onTheConsole.filter((line) => !/404|ERR_INTERNET_DISCONNECTED|Failed to load resource/.test(line))).toEqual([]);
  });
});
