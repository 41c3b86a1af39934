import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase } from '@/db/client';
import { createAccount } from '@/lib/services/accounts/create-account';
import { accessibilityFaults, overflowOf } from '../support/accessibility';
import { startApplication, type TestApplication } from '../support/application';
import { launchBrowser } from '../support/browser';
import { HALF_MINUTE_MS, totp } from '../support/totp';

/** An editor outside the demonstration: nothing but reading until a second factor is set up, then a code at each sign-in. */
const EDITOR = { name: 'R. Amsel', email: 'amsel@counterfoil.example', password: 'seven quiet herons' };
let app: TestApplication;
let browser: Browser;
let page: Page;
let secret = '';
let recovery: string[] = [];
const onTheConsole: string[] = [];

beforeAll(async () => {
  app = await startApplication({ DEMO: '0' });
  const web = openDatabase(app.database.webUrl);
  await createAccount({ ...EDITOR, role: 'editor', affiliation: null }, web);
  await web.$client.end();
  browser = await launchBrowser();
});
afterAll(async () => {
  await browser?.close();
  await app?.stop();
});

async function signIn(next: string): Promise<void> {
  await page?.context().close();
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, reducedMotion: 'reduce' });
  page = await context.newPage();
  page.setDefaultTimeout(45_000);
  page.on('console', (message) => { if (message.type() === 'error') onTheConsole.push(`${message.text()} ${message.location().url}`); });
  page.on('pageerror', (error) => onTheConsole.push(error.message));
  await page.goto(`${app.url}/sign-in?next=${next}`);
  await page.getByLabel('E-mail').fill(EDITOR.email);
  await page.locator('input[name=password]').fill(EDITOR.password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
}

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

describe('an editor without a second factor', () => {
  it('is led from the queue to where it is set up; the interface says the same', async () => {
    await signIn('/queue');
    await page.waitForURL(`${app.url}/account/second-factor?next=%2Fqueue`);
    const answer = await page.request.get(`${app.url}/api/v1/queue`);
    expect(answer.status()).toBe(403);
    expect(((await answer.json()) as { detail: string }).detail).toContain('second factor');
    await expectNoBarrier('the page that sets it up');
  });

  it('gives the password, sees the secret as a square and as text, and gives the first code', async () => {
    await page.getByLabel('Your password').fill(EDITOR.password);
    await page.getByRole('button', { name: 'Set it up' }).click();
    await page.getByRole('img', { name: /Square code/ }).waitFor();
    secret = (await page.locator('[data-secret]').innerText()).replaceAll(/\s/g, '');
    expect(secret).toMatch(/^[A-Z2-7]{32,}$/);
    await expectNoBarrier('the page with the secret');
    await page.getByLabel('The code it shows now').fill(totp(secret, Date.now() + 10 * HALF_MINUTE_MS));
    await page.getByRole('button', { name: 'Switch it on' }).click();
    await page.getByText('This code is not the present one.').waitFor();
    await page.getByLabel('The code it shows now').fill(totp(secret, Date.now() - HALF_MINUTE_MS));
    await page.getByRole('button', { name: 'Switch it on' }).click();
    await page.getByRole('list', { name: 'Recovery codes' }).waitFor();
    recovery = await page.getByRole('list', { name: 'Recovery codes' }).getByRole('listitem').allInnerTexts();
    expect(recovery).toHaveLength(10);
    await expectNoBarrier('the page with the recovery codes');
  });

  it('goes on to the queue', async () => {
    await page.getByRole('link', { name: 'I have kept them; go on' }).click();
    await page.waitForURL(`${app.url}/queue`);
    expect((await page.request.get(`${app.url}/api/v1/queue`)).status()).toBe(200);
  });
});

describe('an editor with a second factor', () => {
  it('is asked for a code after the password, and nothing opens before it', async () => {
    await signIn('/queue');
    await page.waitForURL(`${app.url}/sign-in/second-factor?next=%2Fqueue`);
    expect((await page.request.get(`${app.url}/api/v1/queue`)).status()).toBe(401);
    await expectNoBarrier('the page that asks for a code');
    await page.getByLabel('Six digits from your authenticator').fill(totp(secret));
    await page.getByRole('button', { name: 'Continue', exact: true }).click();
    await page.waitForURL(`${app.url}/queue`);
  });

  it('gets in once by a recovery code', async () => {
    await signIn('/queue');
    await page.waitForURL(/second-factor/);
    await page.getByText('Use a recovery code', { exact: true }).click();
    await page.getByLabel('Recovery code', { exact: true }).fill(recovery[0] ?? '');
    await page.getByRole('button', { name: 'Continue with this code' }).click();
    await page.waitForURL(`${app.url}/queue`);
    await signIn('/queue');
    await page.waitForURL(/second-factor/);
    await page.getByText('Use a recovery code', { exact: true }).click();
    await page.getByLabel('Recovery code', { exact: true }).fill(recovery[0] ?? '');
    await page.getByRole('button', { name: 'Continue with this code' }).click();
    await page.getByText('This is none of the recovery codes that are left.').waitFor();
  });

  it('switches it off with the password, and only reads from then on', async () => {
    await page.getByLabel('Recovery code', { exact: true }).fill(recovery[1] ?? '');
    await page.getByRole('button', { name: 'Continue with this code' }).click();
    await page.waitForURL(`${app.url}/queue`);
    await page.goto(`${app.url}/account/second-factor`);
    await expectNoBarrier('the page that manages it');
    await page.getByText('Switch it off', { exact: true }).click();
    await page.getByLabel('Your password').last().fill(EDITOR.password);
    await page.getByRole('button', { name: 'Switch the second factor off' }).click();
    await page.getByRole('button', { name: 'Set it up' }).waitFor();
    await page.goto(`${app.url}/queue`);
    expect(new URL(page.url()).pathname).toBe('/account/second-factor');
  });
});

it('says nothing on the console but what was refused on purpose', () => {
  expect(onTheConsole.filter((line) => !/status of (400|401)|\/api\/v1\/queue/.test(line))).toEqual([]);
});
