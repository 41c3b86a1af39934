import { readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Browser, BrowserContext, Download, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { openDatabase } from '@/db/client';
import type { FiguresByClaim } from '@/lib/pipeline/result';
import { createAccount } from '@/lib/services/accounts/create-account';
import type { LodgedView, SubmissionView } from '@/lib/services/submissions/submission-view';
import { accessibilityFaults, overflowOf } from '../support/accessibility';
import { startApplication, type TestApplication } from '../support/application';
import { launchBrowser } from '../support/browser';

const SPECIMEN = fileURLToPath(new URL('../../content/specimens/spin-visible/', import.meta.url));
const ACCOUNT = { email: 'author@larkfield.example', password: 'seven quiet herons' };
let app: TestApplication;
let browser: Browser;
let context: BrowserContext;
let page: Page;
let id: string;
const onTheConsole: string[] = [];

const specimen = (name: string): string => readFileSync(path.join(SPECIMEN, name), 'utf8');
const ask = (where: string, init: { method?: string; multipart?: FormData; headers?: Record<string, string> } = {}) =>
  context.request.fetch(`${app.url}/api/v1${where}`, { ...init, headers: { origin: app.url, ...init.headers } });

/** The lodged specimen, when its official run has ended. */
async function lodgedSpecimen(): Promise<string> {
  const form = new FormData();
  form.append('claim', new Blob([specimen('claim.json')], { type: 'application/json' }), 'claim.json');
  for (const name of ['a.txt', 'b.txt', 'noise.txt']) form.append('file', new Blob([specimen(name)]), name);
  const made = (await (await ask('/submissions', { method: 'POST', multipart: form })).json()) as { id: string };
  expect((await ask(`/submissions/${made.id}/check`, { method: 'POST' })).status()).toBe(202);
  const draft = async () => (await (await ask(`/submissions/${made.id}`)).json()) as SubmissionView;
  await vi.waitFor(async () => { const now = await draft(); if (now.kind !== 'draft' || now.check?.run.state !== 'measured') throw new Error(`not checked yet: ${JSON.stringify(now.kind === 'draft' ? now.check : now.kind).slice(0, 400)}\n${app.log().slice(-1500)}`); }, { timeout: 90_000, interval: 1000 });
  const etag = (await ask(`/submissions/${made.id}`)).headers()['etag'];
  const lodged = await ask(`/submissions/${made.id}/lodge`, { method: 'POST', headers: etag ? { 'if-match': etag } : {} });
  expect(lodged.ok(), await lodged.text()).toBe(true);
  await vi.waitUntil(async () => ((await draft()) as LodgedView).run?.state === 'measured', { timeout: 120_000, interval: 1000 });
  return made.id;
}

function listen(to: Page): void {
  to.setDefaultTimeout(45_000);
  to.on('console', (message) => { if (message.type() === 'error') onTheConsole.push(`${message.text()} ${message.location().url}`); });
  to.on('pageerror', (error) => onTheConsole.push(error.message));
}

beforeAll(async () => {
  app = await startApplication();
  const web = openDatabase(app.database.webUrl);
  await createAccount({ ...ACCOUNT, name: 'T. Marrable', role: 'member', affiliation: 'Larkfield Wave Group' }, web);
  await web.$client.end();
  browser = await launchBrowser();
  context = await browser.newContext({ viewport: { width: 1440, height: 900 }, reducedMotion: 'reduce', acceptDownloads: true });
  await context.grantPermissions(['clipboard-read', 'clipboard-write'], { origin: app.url });
  const signedIn = await context.request.post(`${app.url}/api/auth/sign-in/email`, { data: ACCOUNT, headers: { origin: app.url } });
  expect(signedIn.ok()).toBe(true);
  page = await context.newPage();
  listen(page);
  id = await lodgedSpecimen();
}, 300_000);
afterAll(async () => {
  await browser?.close();
  await app?.stop();
});

const clipboard = () => page.evaluate(() => navigator.clipboard.readText());
const strain = () => page.getByRole('slider', { name: /Strain in the detector/ });
const viewOf = (title: RegExp) => page.locator('figure').filter({ has: page.getByRole('slider', { name: title }) });
const rangeShown = async (title: RegExp) => (await viewOf(title).getByRole('group', { name: /^View of/ }).locator('output').innerText()).trim();
const zoomInAddress = () => new URL(page.url()).searchParams.get('zoom') ?? '';
const placeInAddress = () => new URL(page.url()).searchParams.get('at') ?? '';
const contentOf = async (download: Download) => readFileSync(await download.path());

async function saved(kind: 'SVG' | 'PNG' | 'CSV', title: RegExp): Promise<Download> {
  const download = page.waitForEvent('download');
  await viewOf(title).getByRole('button', { name: new RegExp(`as ${kind}`) }).click();
  return download;
}

describe('beside a number', () => {
  it('one click copies the sentence, with U, curve, band, maximisation, frame, modes and where it stands', async () => {
    await page.goto(`${app.url}/submissions/${id}`);
    await page.getByRole('button', { name: 'Copy the sentence of C1 at 60 M⊙' }).click();
    await page.getByText('Copied the sentence of C1 at 60 M⊙.').first().waitFor();
    const sentence = await clipboard();
    expect(sentence).toMatch(/^The match of A and B at 60 M⊙ is 0\.918554\d* ± \S+ × 10⁻\S+ \(k = 2, of the computation alone\), recomputed by Counterfoil, engine \S+, from the authors’ files by two routes \(claimed: 0\.9753 with tolerance 5\.5 × 10⁻⁴; verdict: differs/);
    for (const part of ['noise curve S from noise.txt (SHA-256 ', 'band from 20 Hz to 3,38', 'maximised over time and phase', 'total mass 60 M⊙ in the detector frame', 'all modes of the files', `Counterfoil submission ${id}, not yet entered, revision 1.`]) expect(sentence).toContain(part);
    expect(sentence).not.toMatch(/verified/i);
  });

  it('another copies the row of a LaTeX table beneath its columns; the keyboard reaches both', async () => {
    await page.getByRole('button', { name: 'Copy the LaTeX row of C1 at 200 M⊙' }).press('Enter');
    await page.getByText('Copied the LaTeX row of C1 at 200 M⊙.').first().waitFor();
    const [columns = '', row = ''] = (await clipboard()).split('\n');
    expect(columns).toMatch(/^% claim & quantity & at/);
    expect(row.split(' & ')).toHaveLength(columns.split(' & ').length);
    expect(row).toMatch(/^C1 & Match of A and B & \$200\$\\,\$M_\\odot\$ & \$0\.9932\$ & \$0\.99375\d+ \\pm .*from 20 Hz to 1,015/);
  });

  it('where the browser keeps its clipboard to itself, the text stands selected in a box', async () => {
    const other = await context.newPage();
    listen(other);
    await other.addInitScript(() => Object.defineProperty(navigator, 'clipboard', { value: undefined }));
    await other.goto(`${app.url}/submissions/${id}`);
    await other.getByRole('button', { name: 'Copy the sentence of C1 at 100 M⊙' }).click();
    const box = other.getByRole('dialog', { name: 'Copy by hand' }).getByRole('textbox');
    await box.waitFor();
    expect(await box.evaluate((area: HTMLTextAreaElement) => area.value.slice(area.selectionStart, area.selectionEnd))).toMatch(/^The match of A and B at 100 M⊙ is /);
    await other.keyboard.press('Escape');
    await other.close();
  });
});

describe('the plots of an opened claim', () => {
  it('open into the address, and all rows of the sweep are copied at once', async () => {
    await page.getByRole('button', { name: /^C1/ }).click();
    await page.waitForURL(/[?&]open=C1/);
    await viewOf(/Strain/).locator('canvas').first().waitFor();
    await page.getByRole('button', { name: 'Copy all 3 LaTeX rows of C1' }).click();
    await page.getByText('Copied the 3 LaTeX rows of C1.').first().waitFor();
    expect((await clipboard()).split('\n').map((row) => row.slice(0, 4))).toEqual(['% cl', 'C1 &', 'C1 &', 'C1 &']);
  });

  it('are saved as SVG that stands alone: title, axes with units, legend, source, and no foreign part', async () => {
    const download = await saved('SVG', /Strain/);
    expect(download.suggestedFilename()).toBe(`counterfoil-${id}-r1-C1-waveforms.svg`);
    const svg = (await contentOf(download)).toString('utf8');
    const read = await page.evaluate((text) => {
      const parsed = new DOMParser().parseFromString(text, 'image/svg+xml');
      return { error: parsed.querySelector('parsererror')?.textContent ?? null, words: [...parsed.querySelectorAll('text')].map((t) => t.textContent), paths: parsed.querySelectorAll('path').length, dashed: parsed.querySelectorAll('path[stroke-dasharray]').length };
    }, svg);
    expect(read.error).toBeNull();
    expect(read.words).toEqual(expect.arrayContaining(['Strain in the detector around the peak', 'time [s]', 'strain', 'A', 'B, aligned', 'difference']));
    expect(read.words.join(' ')).toMatch(new RegExp(`Counterfoil submission ${id}.*claim C1, Match of A and B, at 60 M⊙`));
    expect(read.paths).toBeGreaterThanOrEqual(5);
    expect(read.dashed).toBeGreaterThanOrEqual(2);
  });

  it('are saved as PNG of twice the size, with marks on it', async () => {
    const download = await saved('PNG', /Where in the band/);
    expect(download.suggestedFilename()).toBe(`counterfoil-${id}-r1-C1-integrand.png`);
    const png = await contentOf(download);
    expect(png.subarray(0, 8)).toEqual(Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]));
    expect(png.readUInt32BE(16)).toBe(1600);
    expect(png.length).toBeGreaterThan(30_000);
  });

  it('are saved as CSV with every value that was served, to the last digit', async () => {
    const csv = (await contentOf(await saved('CSV', /Where in the band/))).toString('utf8').split('\r\n');
    const run = ((await (await ask(`/submissions/${id}`)).json()) as LodgedView).run;
    const { figures } = (await (await ask(`/submissions/${id}/figures?run=${run?.id}`)).json()) as { figures: FiguresByClaim };
    const figure = figures['C1']?.find((f) => f.kind === 'integrand');
    const rows = csv.filter((line) => line !== '' && !line.startsWith('#')).slice(1).map((line) => line.split(','));
    expect(rows.map((row) => Number(row[0]))).toEqual(figure?.x.values);
    figure?.series.forEach((s, i) => expect(rows.map((row) => (row[i + 1] === '' ? null : Number(row[i + 1])))).toEqual(s.values));
    expect(csv[1]).toContain(`# ${figure?.x.values.length} points`);
  });

  it('zoom by keys: the panel beneath follows, another axis does not, and the address tells it', async () => {
    const whole = await rangeShown(/Strain/);
    expect(whole).toBe('whole axis');
    await strain().focus();
    await page.keyboard.press('Home');
    await page.keyboard.press('+');
    await expect.poll(zoomInAddress).toMatch(/^C1\.time\.s:/);
    const [low = NaN, high = NaN] = zoomInAddress().split(':')[1]?.split(',').map(Number) ?? [];
    expect(high).toBeGreaterThan(low);
    expect(await rangeShown(/Where in the band/)).toBe('whole axis');
    // The pointer at the right edge of the lower panel reads the end of the view, not of the record.
    const lower = viewOf(/Strain/).locator('.u-over').nth(1);
    const box = await lower.boundingBox();
    if (!box) throw new Error('the lower panel has no box');
    await lower.hover({ position: { x: box.width - 2, y: box.height / 2 } });
    const readAt = async () => Number(/^at (\S+)/.exec((await strain().getAttribute('aria-valuetext')) ?? '')?.[1]?.replace('−', '-'));
    await expect.poll(async () => Math.abs((await readAt()) - high) < (high - low) * 0.02).toBe(true);
  });

  it('zoom by a stroke of the pointer', async () => {
    const over = viewOf(/Where in the band/).locator('.u-over').first();
    await over.scrollIntoViewIfNeeded();
    const box = await over.boundingBox();
    if (!box) throw new Error('the plot has no box');
    const y = box.y + box.height / 2;
    await page.mouse.move(box.x + box.width * 0.25, y);
    await page.mouse.down();
    await page.mouse.move(box.x + box.width * 0.5, y, { steps: 4 });
    await page.mouse.up();
    await expect.poll(zoomInAddress).toMatch(/C1\.frequency\.Hz:/);
    expect(await rangeShown(/Where in the band/)).toMatch(/ Hz$/);
  });

  it('are as they were after a reload: open, part of the axis, place of the cursor', async () => {
    await strain().focus();
    const placeBefore = placeInAddress();
    await page.keyboard.press('ArrowRight');
    await expect.poll(placeInAddress).not.toBe(placeBefore);
    const before = { strain: await rangeShown(/Strain/), band: await rangeShown(/Where in the band/), read: await strain().getAttribute('aria-valuetext') };
    const length = await page.evaluate(() => history.length);
    await page.reload();
    await viewOf(/Strain/).locator('canvas').first().waitFor();
    expect({ strain: await rangeShown(/Strain/), band: await rangeShown(/Where in the band/), read: await strain().getAttribute('aria-valuetext') }).toEqual(before);
    expect(await page.evaluate(() => history.length)).toBe(length);
    expect(length).toBeLessThan(5);
  });

  it('show the whole axis again, and the address forgets the view', async () => {
    await strain().focus();
    await page.keyboard.press('0');
    await expect.poll(() => rangeShown(/Strain/)).toBe('whole axis');
    await viewOf(/Where in the band/).getByRole('button', { name: /^Reset/ }).click();
    await expect.poll(zoomInAddress).toBe('');
  });

  it('draws nothing from an address that makes no sense', async () => {
    await page.goto(`${app.url}/submissions/${id}?open=C1,C99&zoom=C1.time.s:9,1;C1.time.s:x;%3Cscript%3E:1,2&at=C1.time.s:1e999`);
    await viewOf(/Strain/).locator('canvas').first().waitFor();
    expect(await rangeShown(/Strain/)).toBe('whole axis');
  });

  it('have no barrier, at 1440 and at 390 pixels, and no page is wider than its window', async () => {
    const state = await context.storageState();
    for (const width of [1440, 390]) {
      const own = await browser.newContext({ viewport: { width, height: 900 }, storageState: state, bypassCSP: true, reducedMotion: 'reduce' });
      const seen = await own.newPage();
      await seen.goto(`${app.url}/submissions/${id}?open=C1`);
      await seen.locator('canvas').first().waitFor();
      expect(await accessibilityFaults(seen), `${width}`).toEqual([]);
      expect(await overflowOf(seen)).toBeLessThanOrEqual(0);
      await own.close();
    }
  });

  it('and nothing was said on the console, under the strict policy', () => {
    expect(onTheConsole).toEqual([]);
  });
});
