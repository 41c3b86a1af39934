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

const SPECIMENS = fileURLToPath(new URL('../../content/specimens/', import.meta.url));
const ACCOUNT = { email: 'author@larkfield.example', password: 'seven quiet herons' };
let app: TestApplication;
let browser: Browser;
let page: Page;
const onTheConsole: string[] = [];

const rowsOf = (file: string): string[] => readFileSync(path.join(SPECIMENS, file), 'utf8').split('\n').filter((row) => row !== '' && !row.startsWith('#'));
/** The imaginary part with the other sign: a file of somebody who writes h₊ + ih×. */
const turned = (): string => rowsOf('typed-by-hand/modes.txt').map((row) => row.replace(/(\S+)\s*$/, (im) => (im.startsWith('-') ? im.slice(1) : `-${im}`))).join('\n');

beforeAll(async () => {
  app = await startApplication();
  const web = openDatabase(app.database.webUrl);
  await createAccount({ ...ACCOUNT, name: 'T. Marrable', role: 'member', affiliation: 'Larkfield Wave Group' }, web);
  await web.$client.end();
  browser = await launchBrowser();
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, reducedMotion: 'reduce', bypassCSP: true });
  page = await context.newPage();
  page.setDefaultTimeout(45_000);
  page.on('pageerror', (error) => onTheConsole.push(error.message));
  await page.goto(`${app.url}/sign-in?next=/submissions`);
  await page.getByLabel('E-mail').fill(ACCOUNT.email);
  await page.locator('input[name=password]').fill(ACCOUNT.password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await page.getByRole('button', { name: 'New submission' }).click();
  await page.waitForURL(/\/compose\/[0-9a-f-]{36}$/);
});
afterAll(async () => {
  await browser?.close();
  await app?.stop();
});

async function expectNoBarrier(where: string): Promise<void> {
  expect(await accessibilityFaults(page), where).toEqual([]);
}
const button = (name: string) => page.getByRole('button', { name, exact: true });
const gone = (name: string) => button(name).waitFor({ state: 'detached' });
const sign = () => page.locator('[name="waveforms.0.polarisation"]').inputValue();

describe('a file that says something else than stands beside it', () => {
  it('is told on its card as soon as it is there, with reason and confidence, before anything is checked', async () => {
    await page.getByLabel('Files to add').setInputFiles([
      { name: 'turned.txt', mimeType: 'text/plain', buffer: Buffer.from(turned()) },
      { name: 'curve.txt', mimeType: 'text/plain', buffer: Buffer.from(rowsOf('spin-visible/noise.txt').join('\n')) },
    ]);
    await button('Remove curve.txt').waitFor();
    await page.locator('#waveforms').getByRole('button', { name: 'Declare a waveform' }).click();
    await page.locator('[name="waveforms.0.file"]').selectOption('turned.txt');
    await button('Declare a file as noise curve').click();
    await page.locator('[name="noise.0.file"]').selectOption('curve.txt');
    await page.locator('[name="noise.0.columns"]').fill('f psd');
    await button('Confirm: sense of rotation of A').waitFor();
    await button('Take what the data say: meaning of the noise column of S').waitFor();
    await page.locator('#waveforms').getByText(/Confidence: almost sure, 0\.95, a judgement/).first().waitFor();
    await page.locator('#noise').getByText(/Read as asd it is G2/).waitFor();
    expect(await sign()).toBe('');
    await expectNoBarrier('the composer with guesses');
  });

  it('is declared so once confirmed, and can be undone', async () => {
    await button('Confirm: sense of rotation of A').click();
    expect(await sign()).toBe('plus-plus-i-cross');
    await gone('Confirm: sense of rotation of A');
    await button('Undo').first().click();
    await expect.poll(sign).toBe('');
    await button('Confirm: sense of rotation of A').click();
    await button('Take what the data say: meaning of the noise column of S').click();
    expect(await page.locator('[name="noise.0.columns"]').inputValue()).toBe('f asd');
  });

  it('set aside stays assumed and is not asked again, also on another day', async () => {
    await button('Not so: unit of time of A').click();
    await gone('Not so: unit of time of A');
    await page.locator('#waveforms').getByText(/settled:.*unit of time/).click();
    await page.locator('#waveforms').getByText('set aside; it stays assumed').waitFor();
    await expectNoBarrier('the composer with guesses settled');
    expect(await page.locator('[name="waveforms.0.timeUnit"]').inputValue()).toBe('');
    await page.getByText('Saved', { exact: true }).waitFor();
    await page.reload();
    await page.getByLabel('Files to add').waitFor();
    await expect.poll(sign).toBe('plus-plus-i-cross');
    expect(await button('Not so: unit of time of A').count()).toBe(0);
    expect(onTheConsole).toEqual([]);
  });
});
