import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase } from '@/db/client';
import { createAccount } from '@/lib/services/accounts/create-account';
import { accessibilityFaults, overflowOf } from '../support/accessibility';
import { startApplication, type TestApplication } from '../support/application';
import { launchBrowser } from '../support/browser';

/** Somebody who has never been here comes by ORCID; somebody with a password links it. On the built application. */
const PASSWORD = 'seven quiet herons';
const NEWCOMER = { name: 'J. Pellworm', id: '0000-0000-4211-0237', email: 'pellworm@larkfield.example' };
const MEMBER = { name: 'H. Brightwater', id: '0000-0000-4210-8159', email: 'brightwater@oxbow.example' };
let app: TestApplication;
let browser: Browser;
let page: Page;
const onTheConsole: string[] = [];

beforeAll(async () => {
  app = await startApplication();
  const web = openDatabase(app.database.webUrl);
  await createAccount({ name: MEMBER.name, email: MEMBER.email, password: PASSWORD, role: 'member', affiliation: 'Oxbow Relativity Unit' }, web);
  await web.$client.end();
  browser = await launchBrowser();
});
afterAll(async () => {
  await browser?.close();
  await app?.stop();
});

async function newPerson(): Promise<void> {
  await page?.context().close();
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, reducedMotion: 'reduce' });
  page = await context.newPage();
  page.setDefaultTimeout(45_000);
  page.on('console', (message) => { if (message.type() === 'error') onTheConsole.push(`${message.text()} ${message.location().url}`); });
  page.on('pageerror', (error) => onTheConsole.push(error.message));
}

/** At three widths and in both themes: no barrier, and nothing that hangs over the edge. */
async function expectNoBarrier(where: string): Promise<void> {
  for (const colorScheme of ['light', 'dark'] as const)
    for (const width of [1440, 1024, 390]) {
      await page.emulateMedia({ colorScheme });
      await page.setViewportSize({ width, height: 900 });
      expect(await accessibilityFaults(page), `${where} ${width} ${colorScheme}`).toEqual([]);
      expect(await overflowOf(page), `${where} ${width}`).toBe(0);
    }
  await page.setViewportSize({ width: 1440, height: 900 });
}

async function letterTo(address: string): Promise<string> {
  for (;;) {
    const letter = app.mail.messages().find(({ to }) => to.includes(address));
    if (letter) return letter.text;
    await page.waitForEvent('framenavigated', { timeout: 500 }).catch(() => undefined);
  }
}

describe('somebody new', () => {
  it('goes to ORCID from the sign-in page, under either name of this machine, and comes back to a page that asks for an address', async () => {
    await newPerson();
    await page.goto(`${app.urls[1]}/sign-in?next=/submissions`);
    await page.getByRole('button', { name: 'Sign in with ORCID' }).click();
    await page.getByRole('link', { name: `Sign in as ${NEWCOMER.name}` }).click();
    await page.waitForURL(`${app.urls[1]}/account/address?next=%2Fsubmissions`);
    expect(await page.getByLabel('Name').inputValue()).toBe(NEWCOMER.name);
    await expectNoBarrier('the page for the address');
  });

  it('is led back there from whatever needs more than reading', async () => {
    await page.goto(`${app.urls[1]}/submissions`);
    expect(new URL(page.url()).pathname).toBe('/account/address');
    expect((await page.request.get(`${app.urls[1]}/api/v1/submissions`)).status()).toBe(403);
  });

  it('names an address, opens the link of the letter and goes on', async () => {
    await page.getByLabel('E-mail').fill(NEWCOMER.email);
    await page.getByRole('button', { name: 'Send the letter' }).click();
    await page.getByText(`A letter is on its way to ${NEWCOMER.email}`).waitFor();
    const token = /\/account\/address\?token=([\w-]+)/.exec(await letterTo(NEWCOMER.email))?.[1] ?? '';
    await page.goto(`${app.urls[1]}/account/address?token=${token}`);
    await expectNoBarrier('the page that confirms');
    await page.getByRole('button', { name: 'Confirm the address' }).click();
    await page.getByText('The address of this account is confirmed').waitFor();
    await page.goto(`${app.urls[1]}/submissions`);
    expect(new URL(page.url()).pathname).toBe('/submissions');
  });

  it('sees the whole iD with the word authenticated in the account', async () => {
    await page.goto(`${app.urls[1]}/account`);
    expect(await page.getByRole('link', { name: `https://orcid.org/${NEWCOMER.id}` }).getAttribute('href')).toBe(`https://orcid.org/${NEWCOMER.id}`);
    await page.getByText('(authenticated)').waitFor();
    await page.getByRole('button', { name: 'Unlink ORCID' }).click();
    await page.getByText('ORCID is the only way into this account').waitFor();
  });
});

describe('somebody with a password', () => {
  it('types an iD: refused with a reason, then shown as typed in', async () => {
    await newPerson();
    await page.goto(`${app.url}/sign-in?next=/account`);
    await page.getByLabel('E-mail').fill(MEMBER.email);
    await page.locator('input[name=password]').fill(PASSWORD);
    await page.getByRole('button', { name: 'Sign in', exact: true }).click();
    await page.waitForURL(`${app.url}/account`);
    await page.getByLabel('ORCID iD, typed in').fill('0000-0000-0000-0012');
    await page.getByRole('button', { name: 'Save', exact: true }).click();
    await page.getByText('a last character that belongs to the fifteen before it').waitFor();
    await page.getByLabel('ORCID iD, typed in').fill('0000-0000-0000-001X');
    await page.getByRole('button', { name: 'Save', exact: true }).click();
    await page.getByText('Saved.').waitFor();
  });

  it('links ORCID with that password, and signs in by either afterwards', async () => {
    await page.getByText('Link ORCID', { exact: true }).click();
    await page.getByLabel('Your password').fill(PASSWORD);
    await page.getByRole('button', { name: 'Go to ORCID' }).click();
    await page.getByRole('link', { name: `Sign in as ${MEMBER.name}` }).click();
    await page.waitForURL(`${app.url}/account?linked=orcid`);
    await page.getByText('ORCID is linked.').waitFor();
    await expectNoBarrier('the account page');
    await newPerson();
    await page.goto(`${app.url}/sign-in?next=/account`);
    await page.getByRole('button', { name: 'Sign in with ORCID' }).click();
    await page.getByRole('link', { name: `Sign in as ${MEMBER.name}` }).click();
    await page.waitForURL(`${app.url}/account`);
    await page.getByText(MEMBER.email).waitFor();
  });

  it('sees both sessions and ends the other', async () => {
    const table = page.getByRole('table', { name: 'Sessions' });
    expect(await table.getByRole('row').count()).toBe(3);
    await page.getByText('this one').waitFor();
    await page.getByRole('button', { name: 'End all others' }).click();
    await table.getByRole('row').nth(2).waitFor({ state: 'detached' });
  });

  it('takes their data home, and finds nobody else in it', async () => {
    const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('link', { name: 'Export my data' }).click()]);
    expect(download.suggestedFilename()).toBe('counterfoil-own-data.json');
    const answer = await page.request.get(`${app.url}/account/export`);
    const text = await answer.text();
    expect(JSON.parse(text)).toMatchObject({ format: 'counterfoil-own-data/1', account: { email: MEMBER.email, typedOrcid: '0000-0000-0000-001X' } });
    for (const other of [NEWCOMER.name, NEWCOMER.email, NEWCOMER.id, 'scrypt$']) expect(text).not.toContain(other);
  });

  it('came back from a refusal at ORCID with a sentence', async () => {
    await newPerson();
    await page.goto(`${app.url}/sign-in`);
    await page.getByRole('button', { name: 'Sign in with ORCID' }).click();
    await page.getByRole('link', { name: 'None of them: go back' }).click();
    await page.getByText('You came back from ORCID without signing in there.').waitFor();
    await expectNoBarrier('the sign-in page with a refusal');
  });
});

it('says nothing on the console on the whole way', () => {
  expect(onTheConsole.filter((line) => !line.includes('/api/v1/submissions'))).toEqual([]);
});
