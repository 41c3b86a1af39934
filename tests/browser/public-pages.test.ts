import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accessibilityFaults, overflowOf } from '../support/accessibility';
import { startApplication, type TestApplication } from '../support/application';
import { launchBrowser } from '../support/browser';

/** What everybody can open without an account, on a fresh database: the empty states are pages too. */
const PATHS = ['/', '/register', '/register?text=nothing&verdict=differs', '/methods', '/methods/match', '/methods/radiated-energy', '/methods/glossary', '/sign-in', '/sign-up', '/forgotten-password', '/reset-password', '/reset-password?token=x'];
const WIDTHS = [1440, 1024, 390] as const;
const THEMES = ['light', 'dark'] as const;

let application: TestApplication;
let browser: Browser;

beforeAll(async () => {
  application = await startApplication();
  browser = await launchBrowser();
});
afterAll(async () => {
  await browser?.close();
  await application?.stop();
});

interface Visit {
  readonly page: Page;
  readonly remarks: string[];
  readonly status: number | undefined;
}

async function visit(path: string, width: number, colorScheme: 'light' | 'dark'): Promise<Visit> {
  const context = await browser.newContext({ viewport: { width, height: 900 }, colorScheme, reducedMotion: 'reduce' });
  const page = await context.newPage();
  const remarks: string[] = [];
  page.on('console', (message) => message.type() === 'error' && remarks.push(message.text()));
  page.on('pageerror', (error) => remarks.push(error.message));
  const response = await page.goto(application.url + path, { waitUntil: 'load' });
  return { page, remarks, status: response?.status() };
}

describe.each(THEMES)('in the %s theme, at every width', (theme) => {
  it.each(PATHS)('%s is free of accessibility faults, fits its window and says nothing on the console', async (path) => {
    const { page, remarks, status } = await visit(path, WIDTHS[0], theme);
    expect(status).toBe(200);
    for (const width of WIDTHS) {
      await page.setViewportSize({ width, height: 900 });
      expect([width, await overflowOf(page)]).toEqual([width, 0]);
      expect([width, ...(await accessibilityFaults(page))]).toEqual([width]);
    }
    expect(remarks).toEqual([]);
    await page.context().close();
  });
});

describe('the frame of every page', () => {
  it('keeps the theme that was chosen, and paints it before any script runs', async () => {
    const { page } = await visit('/register', 1440, 'light');
    const background = () => page.evaluate(() => getComputedStyle(document.body).backgroundColor);
    const light = await background();
    await page.getByRole('button', { name: /^Theme/ }).click();
    await page.getByRole('button', { name: 'Theme: light; change' }).click();
    await page.getByRole('button', { name: 'Theme: dark; change' }).waitFor();
    expect(await background()).not.toBe(light);
    const reloaded = await page.request.get(`${application.url}/register`);
    expect(await reloaded.text()).toContain('<html lang="en" data-theme="dark"');
    await page.context().close();
  });
  it('can be skipped by keyboard', async () => {
    const { page } = await visit('/', 1440, 'light');
    await page.keyboard.press('Tab');
    expect(await page.evaluate(() => document.activeElement?.textContent)).toBe('Skip to the content');
    await page.keyboard.press('Enter');
    expect(new URL(page.url()).hash).toBe('#main');
    await page.context().close();
  });
  it('answers 404 with one designed page to an unknown address, an unknown record and an unknown method', async () => {
    for (const path of ['/nowhere', '/records/0000-0000', '/methods/nothing']) {
      const { page, status } = await visit(path, 1440, 'light');
      expect([path, status]).toEqual([path, 404]);
      expect(await page.getByRole('heading', { level: 1 }).innerText()).toBe('Nothing here');
      expect(await accessibilityFaults(page)).toEqual([]);
      await page.context().close();
    }
  });
});

describe('the sign-in form', () => {
  it('says in a sentence what did not go, and never puts a password in an address', async () => {
    const { page } = await visit('/sign-in?next=//evil.example', 1440, 'light');
    expect(await page.locator('form').getAttribute('method')).toBe('post');
    await page.waitForLoadState('networkidle');
    await page.getByLabel('E-mail').fill('nobody@larkfield.example');
    await page.getByLabel('Password', { exact: true }).fill('four words that differ');
    await page.getByRole('button', { name: 'Sign in', exact: true }).click();
    await page.getByText('do not belong together').waitFor();
    expect(page.url()).not.toContain('four');
    await page.context().close();
  });
});
