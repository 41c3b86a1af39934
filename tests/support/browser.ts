/** One way to start Chromium, for tests and screenshots alike. */
export { launchBrowser } from '@/lib/tools/browser';
