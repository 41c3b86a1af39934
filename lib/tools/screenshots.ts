import { mkdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { parseArgs } from 'node:util';
import type { Browser, BrowserContext } from 'playwright-core';
import { launchBrowser } from '@/lib/tools/browser';

/**
 * Pictures of pages of a running application, in three widths and both themes:
 *
 *   node --import tsx lib/tools/screenshots.ts --to FOLDER [--as ROLE] [--url ADDRESS] [--full] /path /other/path
 *
 * ROLE is a role or an e-mail address of .data/demo-accounts.json. Each line also tells of words on
 * the console and of a page wider than its window.
 */
const WIDTHS = [
  { width: 1440, height: 900 },
  { width: 1024, height: 768 },
  { width: 390, height: 844 },
];
const THEMES = ['light', 'dark'] as const;

interface Account {
  readonly role: string;
  readonly email: string;
  readonly password: string;
}
interface Shot {
  readonly url: string;
  readonly to: string;
  readonly full: boolean;
  readonly paths: readonly string[];
}
type State = Awaited<ReturnType<BrowserContext['storageState']>>;

const fromData = (name: string): string => readFileSync(path.join(process.env['DATA_DIR'] ?? '.data', name), 'utf8');

function runningUrl(): string {
  const { web } = JSON.parse(fromData('ports.json')) as { web: number };
  return `http://localhost:${web}`;
}

function accountOf(who: string): Account {
  const accounts = JSON.parse(fromData('demo-accounts.json')) as Account[];
  const found = accounts.find(({ role, email }) => [role.toLowerCase(), email].includes(who.toLowerCase()));
  if (!found) throw new Error(`Nobody of the demonstration is "${who}"; there are ${accounts.map(({ role }) => role).join(', ')}.`);
  return found;
}

/** Signs in once; the sessions of all pictures share its cookie, for sign-ins are rationed. */
async function signIn(browser: Browser, url: string, who: string): Promise<State> {
  const { email, password } = accountOf(who);
  const context = await browser.newContext();
  const response = await context.request.post(`${url}/api/auth/sign-in/email`, { data: { email, password }, headers: { origin: url } });
  if (!response.ok()) throw new Error(`Signing in as ${email} answered ${response.status()}: ${await response.text()}`);
  const state = await context.storageState();
  await context.close();
  return state;
}

async function takeAll(browser: Browser, shot: Shot, state: State | undefined): Promise<void> {
  for (const viewport of WIDTHS)
    for (const colorScheme of THEMES) {
      const context = await browser.newContext({ viewport, colorScheme, reducedMotion: 'reduce', storageState: state });
      for (const target of shot.paths) await takeOne(context, shot, target, `${viewport.width}-${colorScheme}`);
      await context.close();
    }
}

async function takeOne(context: BrowserContext, shot: Shot, target: string, variant: string): Promise<void> {
  const page = await context.newPage();
  const remarks: string[] = [];
  page.on('console', (message) => message.type() === 'error' && remarks.push(`${message.text()} (${message.location().url})`));
  page.on('pageerror', (error) => remarks.push(error.message));
  const response = await page.goto(shot.url + target, { waitUntil: 'load' });
  await page.waitForLoadState('networkidle', { timeout: 5000 }).catch(() => remarks.push('still talking to the server after 5 s'));
  const [wanted, given] = await page.evaluate(() => [document.documentElement.scrollWidth, document.documentElement.clientWidth]);
  if (wanted !== undefined && given !== undefined && wanted > given) remarks.push(`${wanted} px wide in a window of ${given} px`);
  const file = path.join(shot.to, `${nameOf(target)}-${variant}.png`);
  await page.screenshot({ path: file, fullPage: shot.full });
  await page.close();
  console.log([file, response?.status(), ...remarks].join('  '));
}

const nameOf = (target: string): string => target.replace(/[^a-z0-9]+/gi, '-').replace(/^-|-$/g, '') || 'front';

const { values, positionals } = parseArgs({
  allowPositionals: true,
  options: { to: { type: 'string' }, as: { type: 'string' }, url: { type: 'string' }, full: { type: 'boolean', default: false } },
});
if (!values.to) throw new Error('Say where the pictures go: --to FOLDER');
mkdirSync(values.to, { recursive: true });
const shot = { url: values.url ?? runningUrl(), to: values.to, full: values.full, paths: positionals.length > 0 ? positionals : ['/'] };
const browser = await launchBrowser();
try {
  await takeAll(browser, shot, values.as === undefined ? undefined : await signIn(browser, shot.url, values.as));
} finally {
  await browser.close();
}
