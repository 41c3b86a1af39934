/** The first that fits wins: most browsers also name those they descend from. */
const BROWSERS: readonly (readonly [RegExp, string])[] = [
  [/\bEdg(e|A|iOS)?\//, 'Edge'],
  [/\bOPR\//, 'Opera'],
  [/\b(Firefox|FxiOS)\//, 'Firefox'],
  [/\bHeadlessChrome\//, 'Chromium without a window'],
  [/\b(Chrome|CriOS|Chromium)\//, 'Chrome or Chromium'],
  [/\bVersion\/[\d.]+.*\bSafari\//, 'Safari'],
];
const SYSTEMS: readonly (readonly [RegExp, string])[] = [
  [/\b(iPhone|iPad)\b/, 'iOS'],
  [/\bAndroid\b/, 'Android'],
  [/\bWindows\b/, 'Windows'],
  [/\bMac OS X\b/, 'macOS'],
  [/\bCrOS\b/, 'ChromeOS'],
  [/\bLinux\b/, 'Linux'],
];

const wordFor = (words: typeof BROWSERS, agent: string): string | undefined => words.find(([form]) => form.test(agent))?.[1];

/** A browser may call itself anything; this is a help to memory and proves nothing. */
export function deviceWords(userAgent: string | null): string {
  if (!userAgent) return 'A program that gives no name';
  const browser = wordFor(BROWSERS, userAgent);
  const system = wordFor(SYSTEMS, userAgent);
  if (!browser && !system) return 'A browser not known here';
  return `${browser ?? 'A browser not known here'} on ${system ?? 'a system not known here'}`;
}
