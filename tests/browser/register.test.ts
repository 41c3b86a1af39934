import type { Browser, BrowserContextOptions, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase, type Database } from '@/db/client';
import { openAccount } from '@/db/writes/accounts/open-account';
import { accessibilityFaults, overflowOf } from '../support/accessibility';
import { startApplication, type TestApplication } from '../support/application';
import { launchBrowser } from '../support/browser';
import { plantRecord, stand } from '../support/planted-records';

/** A register with two pages, a struck record, many claims in one, and a title that looks like markup. */
const MARKUP = '<b>Bold</b> & "quoted" ]]> claim';

let application: TestApplication;
let browser: Browser;
let owner: Database;

beforeAll(async () => {
  [application, browser] = await Promise.all([startApplication(), launchBrowser()]);
  owner = openDatabase(application.database.ownerUrl, { max: 2, onError: () => undefined });
  const desk = { sql: async <T>(text: string, ...values: unknown[]) => (await owner.$client.query(text, values)).rows as T[] };
  const userId = await owner.transaction((tx) => openAccount(tx, { name: 'T. Marrable', email: 't.marrable@larkfield.example', role: 'member', affiliation: 'Larkfield Wave Group', passwordHash: 'none' }));
  for (let i = 0; i < 21; i++) await plantRecord(desk, userId, { id: `00aa-00${String(i).padStart(2, '0')}`, title: `Alignment of spins, part ${i + 1}`, enteredAt: `2026-03-${String(i + 1).padStart(2, '0')}T00:00:00Z` });
  await plantRecord(desk, userId, { id: '11aa-0000', title: MARKUP, authors: ['K. Dovrel', 'E. Tansley-Mbeki', 'N. Ostrakh'], enteredAt: '2026-05-01T00:00:00Z', claims: Array.from({ length: 12 }, (_, i) => ({ quantity: i % 2 ? 'snr' : 'radiated-energy', verdict: ['agrees', 'differs', 'unsettled', 'not-computable', 'routes-disagree'][i % 5] ?? 'agrees', noise: i % 2 ? 'attached' : 'none' })) });
  await plantRecord(desk, userId, { id: '22aa-0000', title: 'A recoil that was withdrawn', enteredAt: '2026-05-02T00:00:00Z' });
  await stand(desk, '22aa-0000', 'struck', '2026-06-01T00:00:00Z', 'The files were those of another run.');
}, 180_000);
afterAll(async () => {
  await owner?.$client.end();
  await browser?.close();
  await application?.stop();
});

async function open(path: string, options: BrowserContextOptions = {}): Promise<{ page: Page; remarks: string[] }> {
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, reducedMotion: 'reduce', ...options });
  const page = await context.newPage();
  const remarks: string[] = [];
  page.on('console', (message) => message.type() === 'error' && remarks.push(message.text()));
  page.on('pageerror', (error) => remarks.push(error.message));
  expect((await page.goto(application.url + path, { waitUntil: 'load' }))?.status()).toBe(200);
  return { page, remarks };
}
const titlesOn = (page: Page) => page.locator('table.register tbody th a').allInnerTexts();

describe.each(['light', 'dark'] as const)('in the %s theme, at every width', (colorScheme) => {
  it.each(['/register', '/register?quantity=mach&from=tomorrow&page=9', '/register?text=nothing', '/methods/conventions', '/methods/budget', '/methods/horizon-distance'])('%s is free of accessibility faults and fits its window', async (path) => {
    const { page, remarks } = await open(path, { colorScheme });
    for (const width of [1440, 1024, 390]) {
      await page.setViewportSize({ width, height: 900 });
      expect([width, await overflowOf(page)]).toEqual([width, 0]);
      expect([width, ...(await accessibilityFaults(page))]).toEqual([width]);
    }
    expect(remarks).toEqual([]);
    await page.context().close();
  });
});

describe('without any script', () => {
  it('the register searches, filters, sorts and turns its pages by links and a form', async () => {
    const { page } = await open('/register', { javaScriptEnabled: false });
    expect(await page.getByRole('status').first().innerText()).toBe('23 records');
    await page.getByRole('link', { name: 'Next' }).click();
    await page.waitForURL((url) => url.search === '?page=2');
    expect(await titlesOn(page)).toEqual(['Alignment of spins, part 3', 'Alignment of spins, part 2', 'Alignment of spins, part 1']);
    await page.goto(`${application.url}/register`);
    await page.getByRole('link', { name: 'Entered' }).click();
    await page.waitForURL((url) => url.search !== '');
    expect(await page.getByRole('columnheader', { name: 'Entered' }).getAttribute('aria-sort')).toBe('ascending');
    expect((await titlesOn(page))[0]).toBe('Alignment of spins, part 1');
    await page.getByLabel('Words in title, author, quantity or statement').fill('bold');
    await page.getByRole('button', { name: 'Search' }).click();
    await page.waitForURL((url) => url.searchParams.get('text') === 'bold');
    expect(await titlesOn(page)).toEqual([MARKUP]);
    await page.goto(`${application.url}/register?standing=struck`);
    expect(await titlesOn(page)).toEqual(['A recoil that was withdrawn']);
    expect(await page.locator('table.register').innerText()).toContain('since 1 Jun 2026');
    await page.getByRole('link', { name: 'Remove: Struck' }).click();
    await page.waitForURL((url) => !url.searchParams.has('standing'));
    expect(await page.getByRole('status').first().innerText()).toBe('23 records');
    await page.context().close();
  });
});

describe('on a phone', () => {
  it('each record is a card, its heads are not shown, and the filters unfold by keyboard', async () => {
    const { page } = await open('/register', { viewport: { width: 390, height: 844 } });
    expect((await page.locator('table.register thead').boundingBox())?.height ?? 0).toBeLessThanOrEqual(1);
    const quantity = page.getByLabel('Quantity', { exact: true });
    expect(await quantity.isVisible()).toBe(false);
    await page.locator('.register-filters > summary').focus();
    await page.keyboard.press('Enter');
    await quantity.waitFor({ state: 'visible' });
    await page.context().close();
  });
});

describe('the files of a search', () => {
  it('are named in the head; the feed is well formed and says the title as it is', async () => {
    const { page } = await open('/register?text=bold');
    const feed = await page.locator('link[rel="alternate"][type="application/atom+xml"]').getAttribute('href');
    expect(new URL(feed ?? '', application.url).search).toBe('?text=bold');
    const xml = await (await page.request.get(new URL(feed ?? '', application.url).toString())).text();
    const read = await page.evaluate((text) => {
      const document_ = new DOMParser().parseFromString(text, 'application/xml');
      return { faults: document_.querySelectorAll('parsererror').length, titles: [...document_.querySelectorAll('entry > title')].map((node) => node.textContent) };
    }, xml);
    expect(read).toEqual({ faults: 0, titles: [MARKUP] });
    const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('link', { name: 'CSV' }).click()]);
    expect(download.suggestedFilename()).toBe('counterfoil-records.csv');
    await page.context().close();
  });
});
