import { readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase } from '@/db/client';
import { createAccount } from '@/lib/services/accounts/create-account';
import { accessibilityFaults } from '../support/accessibility';
import { startApplication, type TestApplication } from '../support/application';
import { launchBrowser } from '../support/browser';

const SPECIMEN = fileURLToPath(new URL('../../content/specimens/spin-visible/', import.meta.url));
const ACCOUNT = { email: 'author@larkfield.example', password: 'seven quiet herons' };
/** Weighed twice, before there was an engine; the same number holds tests/golden/specimen-numbers.test.ts. */
const EXPECTED = { match: 0.9185, required: 'common practice' };
let app: TestApplication;
let browser: Browser;
let page: Page;
const onTheConsole: string[] = [];

beforeAll(async () => {
  app = await startApplication();
  const web = openDatabase(app.database.webUrl);
  await createAccount({ ...ACCOUNT, name: 'T. Marrable', role: 'member', affiliation: 'Larkfield Wave Group' }, web);
  await web.$client.end();
  browser = await launchBrowser();
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, reducedMotion: 'reduce', bypassCSP: true });
  page = await context.newPage();
  page.setDefaultTimeout(45_000);
  page.on('console', (message) => { if (message.type() === 'error') onTheConsole.push(`${message.text()} ${message.location().url}`); });
  page.on('pageerror', (error) => onTheConsole.push(error.message));
});
afterAll(async () => {
  await browser?.close();
  await app?.stop();
});

const part = (id: string) => page.locator(`#${id}`);
const specimen = (name: string): string => readFileSync(path.join(SPECIMEN, name), 'utf8');

/** A curve of the author's own: every second point of the specimen's, written with commas. */
const ownCurve = (): string =>
  specimen('noise.txt')
    .split('\n')
    .filter((line, i) => line !== '' && !line.startsWith('#') && i % 2 === 0)
    .map((line) => line.trim().split(/\s+/).join(', '))
    .join('\n');

async function expectNoBarrier(where: string): Promise<void> {
  expect(await accessibilityFaults(page), where).toEqual([]);
}

const saved = () => page.getByText('Saved', { exact: true }).waitFor();

describe('an author', () => {
  it('signs in and opens an empty draft', async () => {
    await page.goto(`${app.url}/sign-in?next=/submissions`);
    await page.getByLabel('E-mail').fill(ACCOUNT.email);
    await page.locator('input[name=password]').fill(ACCOUNT.password);
    await page.getByRole('button', { name: 'Sign in', exact: true }).click();
    await page.getByRole('heading', { name: 'Nothing here yet' }).waitFor();
    await expectNoBarrier('the empty list');
    await page.getByRole('button', { name: 'New submission' }).click();
    await page.waitForURL(/\/compose\/[0-9a-f-]{36}$/);
    await page.getByRole('heading', { level: 1, name: 'Untitled draft' }).waitFor();
    await expectNoBarrier('the empty composer');
  });

  it('adds two waveforms and a curve of their own, and sees each drawn at once', async () => {
    await page.getByLabel('Files to add').setInputFiles([
      { name: 'a.txt', mimeType: 'text/plain', buffer: Buffer.from(specimen('a.txt')) },
      { name: 'b.txt', mimeType: 'text/plain', buffer: Buffer.from(specimen('b.txt')) },
      { name: 'own-curve.txt', mimeType: 'text/plain', buffer: Buffer.from(ownCurve()) },
    ]);
    for (const name of ['a.txt', 'b.txt', 'own-curve.txt']) await page.getByRole('button', { name: `Remove ${name}` }).waitFor();
    expect(await part('files').getByText('sha256').count()).toBe(3);
    await part('files').getByText(/20,0\d\d rows, 3 columns; the first column runs from/).first().waitFor();
    await part('files').locator('canvas').first().waitFor();
  });

  it('declares them and claims a number', async () => {
    await page.getByLabel('Title', { exact: true }).fill('Spin 0.2 at 60 solar masses');
    for (const [i, file] of ['a.txt', 'b.txt'].entries()) {
      await part('waveforms').getByRole('button', { name: 'Declare a waveform' }).click();
      await page.locator(`[name="waveforms.${i}.file"]`).selectOption(file);
      await page.locator(`[name="waveforms.${i}.columns"]`).fill('t re22 im22');
      await page.locator(`[name="waveforms.${i}.negativeM"]`).selectOption('mirror');
    }
    await page.getByRole('button', { name: 'Declare a file as noise curve' }).click();
    await page.locator('[name="noise.0.file"]').selectOption('own-curve.txt');
    await page.getByRole('button', { name: 'Add a claim' }).click();
    await page.locator('[name="claims.0.quantity"]').selectOption('match');
    await page.locator('[name="claims.0.settings.totalMassMsun"]').fill('60');
    await page.locator('[name="claims.0.settings.fLowHz"]').fill('20');
    await page.locator('[name="claims.0.claimed"]').fill('0.9186(2)');
    await part('claims').getByText('0.9186 ± 0.0002').first().waitFor();
    await page.locator('[name="claims.0.tolerance"]').fill('0.001');
    await page.getByRole('textbox', { name: 'Statement' }).fill('Told apart: $\\mathcal M = 0.9186(2)$ at *60 solar masses*.');
    await part('statement').locator('.katex').first().waitFor();
    await saved();
    await page.reload();
    // The boxes are filled when the page's script has come.
    await expect.poll(() => page.locator('[name="claims.0.claimed"]').inputValue(), { timeout: 20_000 }).toBe('0.9186(2)');
  });

  it('checks it, and finds the recomputed value with its uncertainty beside the claimed one', async () => {
    expect(await page.getByRole('button', { name: 'Lodge', exact: true }).getAttribute('aria-disabled')).toBe('true');
    await part('check').getByRole('button', { name: 'Check', exact: true }).click();
    const table = page.locator('table.ctable');
    await table.getByText('0.9186(2)').first().waitFor();
    await part('check').getByRole('button', { name: 'Check again' }).waitFor({ timeout: 100_000 });
    const row = (await table.locator('tr#C1').innerText()).replace(/\s+/g, ' ');
    const [, value, u] = /0\.9186\(2\) .*?(0\.918\d+) (\S+ × 10\S+|\S+) .*Agrees/.exec(row) ?? [];
    expect(Number(value), row).toAgreeWith(EXPECTED.match, 1e-3);
    expect(u, row).toBeTruthy();
    await expectNoBarrier('the checked composer');
  });

  it('lodges it and reads it as referees will', async () => {
    const lodge = page.getByRole('button', { name: 'Lodge', exact: true });
    await expect.poll(() => lodge.getAttribute('aria-disabled'), { timeout: 20_000 }).toBeNull();
    await lodge.click();
    await page.waitForURL(/\/submissions\/[0-9a-f-]{36}$/);
    await page.getByRole('heading', { level: 1, name: 'Spin 0.2 at 60 solar masses' }).waitFor();
    await expect.poll(() => page.locator('tr#C1').innerText(), { timeout: 100_000 }).toMatch(/Agrees|Differs|Unsettled/);
    await expectNoBarrier('the lodged submission');
    await page.goto(`${app.url}/submissions`);
    await page.getByRole('link', { name: 'Spin 0.2 at 60 solar masses' }).waitFor();
    expect(onTheConsole).toEqual([]);
  });
});
