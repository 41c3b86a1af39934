import { execFile } from 'node:child_process';
import { cpSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase } from '@/db/client';
import type { AccountRole } from '@/lib/policy/account-role';
import { createAccount } from '@/lib/services/accounts/create-account';
import { accessibilityFaults } from '../support/accessibility';
import { startApplication, type TestApplication } from '../support/application';
import { launchBrowser } from '../support/browser';
import { temporaryFolder } from '../support/fakes';

/** From a folder of files to a record that a stranger verifies: every step in a browser, as its own person. */
const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const TITLE = 'Spin 0.2 is visible at 60 solar masses';
const PASSWORD = 'seven quiet herons';
const PEOPLE = {
  author: { name: 'T. Marrable', email: 'author@larkfield.example', role: 'member' },
  referee: { name: 'S. Vasterling', email: 'referee@northquay.example', role: 'member' },
  second: { name: 'E. Tansley-Mbeki', email: 'second@hollowell.example', role: 'member' },
  editor: { name: 'R. Amsel', email: 'editor@counterfoil.example', role: 'editor' },
} as const satisfies Record<string, { name: string; email: string; role: AccountRole }>;
type Who = keyof typeof PEOPLE;

let app: TestApplication;
let browser: Browser;
let folder: string;
let submission: string;
let recordId: string;
const pages = {} as Record<Who | 'stranger', Page>;
const ids = {} as Record<Who, string>;
const onTheConsole: string[] = [];

beforeAll(async () => {
  folder = temporaryFolder('course');
  app = await startApplication();
  const web = openDatabase(app.database.webUrl);
  for (const who of Object.keys(PEOPLE) as Who[]) ids[who] = await createAccount({ ...PEOPLE[who], affiliation: null, password: PASSWORD }, web);
  await web.$client.end();
  browser = await launchBrowser();
  for (const who of [...(Object.keys(PEOPLE) as Who[]), 'stranger' as const]) pages[who] = await openPage(who);
});
afterAll(async () => {
  await browser?.close();
  await app?.stop();
  rmSync(folder, { recursive: true, force: true });
});

async function openPage(who: string): Promise<Page> {
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, reducedMotion: 'reduce' });
  const page = await context.newPage();
  page.setDefaultTimeout(120_000);
  page.on('console', (message) => { if (message.type() === 'error') onTheConsole.push(`${who}: ${message.text()} ${message.location().url}`); });
  page.on('pageerror', (error) => onTheConsole.push(`${who}: ${error.message}`));
  return page;
}

async function expectNoBarrier(page: Page): Promise<void> {
  expect(await accessibilityFaults(page), page.url()).toEqual([]);
}

async function visit(page: Page, address: string): Promise<void> {
  await page.goto(`${app.url}${address}`, { waitUntil: 'load' });
  await expectNoBarrier(page);
}

async function signIn(who: Who): Promise<void> {
  const page = pages[who];
  await page.goto(`${app.url}/sign-in?next=/account`);
  await page.getByLabel('E-mail').fill(PEOPLE[who].email);
  await page.locator('input[name=password]').fill(PASSWORD);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await page.waitForURL(`${app.url}/account`);
}

/** The specimen with the edge that its printed numbers were made with, in a folder of its own. */
function claimFolder(): string {
  const to = path.join(folder, 'claim');
  cpSync(path.join(ROOT, 'content/specimens/spin-visible'), to, { recursive: true });
  const sheet = JSON.parse(readFileSync(path.join(to, 'claim.json'), 'utf8')) as { claims: { settings: { fLowHz: number } }[] };
  for (const claim of sheet.claims) claim.settings.fLowHz = 30;
  writeFileSync(path.join(to, 'claim.json'), JSON.stringify(sheet));
  return to;
}

/** A row's button, which says for screen readers whose step it is. */
const stepOf = (step: string): RegExp => new RegExp(`^${step}\\s*: ${TITLE}$`);

async function verify(...args: string[]): Promise<{ readonly code: number; readonly said: string }> {
  return new Promise((resolve) => {
    execFile('npm', ['run', '--silent', 'verify', '--', ...args], { cwd: ROOT }, (error, stdout, stderr) => resolve({ code: error ? Number(error.code) : 0, said: stdout + stderr }));
  });
}

describe('a claim takes the whole course', { timeout: 600_000 }, () => {
  it('pages for everybody have no barrier', async () => {
    for (const address of ['/', '/sign-in', '/methods', '/register']) await visit(pages.stranger, address);
  });

  it('the author loads a folder, checks and lodges it', async () => {
    const page = pages.author;
    await signIn('author');
    await page.goto(`${app.url}/submissions`);
    await page.getByLabel('Claim-sheet folder to load').setInputFiles(claimFolder());
    await page.waitForURL(/\/compose\/[0-9a-f-]{36}$/);
    submission = page.url().slice(-36);
    await page.locator('#check').getByRole('button', { name: 'Check', exact: true }).click();
    const lodge = page.getByRole('button', { name: 'Lodge', exact: true });
    await expect.poll(() => lodge.getAttribute('aria-disabled'), { timeout: 240_000 }).toBeNull();
    await lodge.click();
    await page.waitForURL(`${app.url}/submissions/${submission}`);
    await expect.poll(() => page.locator('tr#C1').innerText(), { timeout: 240_000 }).toMatch(/Agrees/);
  });

  it('an editor takes it and asks two referees', async () => {
    const page = pages.editor;
    await signIn('editor');
    await expect.poll(async () => { await page.goto(`${app.url}/queue`); return page.getByRole('button', { name: stepOf('Take it') }).count(); }, { timeout: 120_000 }).toBe(1);
    await expectNoBarrier(page);
    await page.getByRole('button', { name: stepOf('Take it') }).click();
    await page.getByRole('link', { name: stepOf('Choose referees') }).click();
    await page.waitForURL(`${app.url}/review/${submission}`);
    for (const who of ['referee', 'second'] as const) {
      await page.getByLabel('Ask a referee').selectOption(ids[who]);
      await page.getByRole('button', { name: 'Invite', exact: true }).click();
      await page.getByText(PEOPLE[who].name, { exact: true }).waitFor();
    }
    await expectNoBarrier(page);
  });

  it.each(['referee', 'second'] as const)('the %s accepts, and sees the package only then', async (who) => {
    const page = pages[who];
    await signIn(who);
    expect((await page.goto(`${app.url}/review/${submission}`))?.status()).toBe(404);
    onTheConsole.splice(0, onTheConsole.length, ...onTheConsole.filter((line) => !line.includes('404')));
    await visit(page, '/desk');
    await page.getByRole('link', { name: stepOf('Answer') }).click();
    await page.getByRole('heading', { level: 1, name: TITLE }).waitFor();
    await expectNoBarrier(page);
    await page.getByLabel('I have no conflict of interest').check();
    await page.getByRole('button', { name: 'Accept', exact: true }).click();
    await page.waitForURL(`${app.url}/review/${submission}`);
    await page.getByText(/You read as Referee [A-H]/).waitFor();
  });

  it('a referee asks about a number, the author answers, and never learns who asked', async () => {
    const referee = pages.referee;
    await referee.goto(`${app.url}/review/${submission}#C1`);
    await referee.getByText('Comment on C1').click();
    await referee.getByLabel('On which number').selectOption('0');
    await referee.getByLabel('Comment', { exact: true }).fill('Why does the band begin at $f_l=30$ Hz?');
    await referee.getByRole('button', { name: 'Open the thread' }).click();
    await referee.getByRole('article', { name: 'Thread 1' }).locator('.katex').first().waitFor();
    await expectNoBarrier(referee);
    const author = pages.author;
    await author.goto(`${app.url}/review/${submission}`);
    await author.getByLabel('Reply to thread 1').fill('Below it the detector of our statement hears nothing.');
    await author.getByRole('button', { name: 'Reply', exact: true }).click();
    await author.getByText('answered', { exact: true }).first().waitFor();
    const read = await author.content();
    for (const { name, email } of [PEOPLE.referee, PEOPLE.second]) for (const secret of [name, email]) expect(read).not.toContain(secret);
    await expectNoBarrier(author);
  });

  it.each(['referee', 'second'] as const)('the %s hands in a report', async (who) => {
    const page = pages[who];
    await visit(page, `/review/${submission}/report`);
    for (const i of [1, 2, 3, 4, 5]) await page.getByLabel(new RegExp(`^${i}\\. `)).fill('Yes, as far as the files show.');
    await page.getByLabel('Recommendation').selectOption('enter-1');
    await page.getByRole('button', { name: 'Hand in the report' }).click();
    await page.waitForURL(`${app.url}/review/${submission}`);
  });

  it('the editor enters it at level 1, signed with the title’s first words', async () => {
    const page = pages.editor;
    await visit(page, '/queue');
    await visit(page, `/review/${submission}/decide`);
    await page.getByText('Enter in the register', { exact: true }).first().click();
    await page.getByLabel(/^1\. Number/).check();
    await page.getByRole('textbox', { name: 'Letter' }).fill('Both referees recommend it. I enter it at level 1.');
    await expectNoBarrier(page);
    const sign = page.getByLabel(/^To sign, type/);
    await sign.fill('Some other words');
    await page.getByRole('button', { name: 'Enter in the register' }).click();
    await page.getByText('To sign, type the first words of the title').waitFor();
    await sign.fill('spin 0.2 IS');
    await page.getByRole('button', { name: 'Enter in the register' }).click();
    await page.waitForURL(`${app.url}/review/${submission}`);
  });

  it('the record appears with its badge, and leads to what a stranger needs', async () => {
    const page = pages.stranger;
    await expect.poll(async () => { await page.goto(`${app.url}/register`); return page.getByRole('link', { name: TITLE }).count(); }, { timeout: 120_000 }).toBe(1);
    await expectNoBarrier(page);
    await page.getByRole('link', { name: TITLE }).click();
    await page.waitForURL(/\/records\/[0-9a-z-]+$/);
    recordId = page.url().split('/').at(-1) ?? '';
    expect(await page.getByRole('img', { name: /^Badge: .*level 1$/ }).evaluate((img) => (img as HTMLImageElement).naturalWidth)).toBeGreaterThan(0);
    await expectNoBarrier(page);
    await page.goto(`${app.url}/records/${recordId}#C1`);
    await page.locator('canvas').first().waitFor();
    await expectNoBarrier(page);
    for (const secret of [PEOPLE.referee.name, PEOPLE.second.name, '@']) expect(await page.locator('main').innerText()).not.toContain(secret);
  });

  it('what is downloaded verifies offline with the key alone, and no longer after one changed byte', async () => {
    const page = pages.stranger;
    const take = async (href: string, name: string): Promise<string> => {
      const answer = await page.request.get(new URL(href, app.url).href);
      expect(answer.status()).toBe(200);
      writeFileSync(path.join(folder, name), await answer.body());
      return path.join(folder, name);
    };
    const record = await take(`/records/${recordId}/record.json`, 'record.json');
    await take(`/records/${recordId}/signature.json`, 'signature.json');
    const key = await take((await page.locator('a[href^="/keys/"]').first().getAttribute('href')) ?? '', 'key.pem');
    const files = path.join(folder, 'claim');
    expect(await verify(record, '--key', key, '--files', files)).toMatchObject({ code: 0 });
    const bytes = readFileSync(record);
    const at = bytes.indexOf('0.9753');
    expect(at).toBeGreaterThan(0);
    bytes[at + 5] = '4'.charCodeAt(0);
    writeFileSync(record, bytes);
    expect(await verify(record, '--key', key)).toMatchObject({ code: 1 });
  });

  it('no page wrote an error on the console', () => {
    expect(onTheConsole).toEqual([]);
  });
});
