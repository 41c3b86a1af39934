import { chromium, type Browser } from 'playwright-core';

/** Debian's Chromium. The sandbox goes only for root, for whom Chromium would not start otherwise. */
export function launchBrowser(): Promise<Browser> {
  const rootOnly = process.getuid?.() === 0 ? ['--no-sandbox'] : [];
  return chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: [
      ...rootOnly,
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-dev-shm-usage',
      '--disable-gpu',
      '--font-render-hinting=none',
      '--no-first-run',
    ],
  });
}
