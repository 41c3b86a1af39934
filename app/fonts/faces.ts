import localFont from 'next/font/local';

/*
 * The three typefaces, shipped with the application (SIL Open Font License). Each subset is its
 * own family, stacked in tailwind.config.ts: the Greek and extended files are fetched only when a
 * page has such a letter. No size-adjusted stand-ins, since one would catch the Greek first.
 */
export const serif = localFont({
  src: [
    { path: '../../node_modules/@fontsource-variable/source-serif-4/files/source-serif-4-latin-opsz-normal.woff2', style: 'normal' },
    { path: '../../node_modules/@fontsource-variable/source-serif-4/files/source-serif-4-latin-opsz-italic.woff2', style: 'italic' },
  ],
  weight: '200 900',
  variable: '--font-serif',
  display: 'swap',
  adjustFontFallback: false,
  preload: false,
});
export const serifGreek = localFont({
  src: [
    { path: '../../node_modules/@fontsource-variable/source-serif-4/files/source-serif-4-greek-wght-normal.woff2', style: 'normal' },
    { path: '../../node_modules/@fontsource-variable/source-serif-4/files/source-serif-4-greek-wght-italic.woff2', style: 'italic' },
  ],
  weight: '200 900',
  variable: '--font-serif-greek',
  display: 'swap',
  adjustFontFallback: false,
  preload: false,
  declarations: [{ prop: 'unicode-range', value: 'U+0370-03FF' }],
});
export const sans = localFont({
  src: [
    { path: '../../node_modules/@fontsource-variable/source-sans-3/files/source-sans-3-latin-wght-normal.woff2', style: 'normal' },
    { path: '../../node_modules/@fontsource-variable/source-sans-3/files/source-sans-3-latin-wght-italic.woff2', style: 'italic' },
  ],
  weight: '200 900',
  variable: '--font-sans',
  display: 'swap',
  adjustFontFallback: false,
  preload: false,
});
export const sansGreek = localFont({
  src: '../../node_modules/@fontsource-variable/source-sans-3/files/source-sans-3-greek-wght-normal.woff2',
  weight: '200 900',
  variable: '--font-sans-greek',
  display: 'swap',
  adjustFontFallback: false,
  preload: false,
  declarations: [{ prop: 'unicode-range', value: 'U+0370-03FF' }],
});
export const sansExtended = localFont({
  src: '../../node_modules/@fontsource-variable/source-sans-3/files/source-sans-3-latin-ext-wght-normal.woff2',
  weight: '200 900',
  variable: '--font-sans-ext',
  display: 'swap',
  adjustFontFallback: false,
  preload: false,
  declarations: [{ prop: 'unicode-range', value: 'U+0100-02BA, U+1E00-1E9F, U+2113' }],
});
export const code = localFont({
  src: '../../node_modules/@fontsource-variable/source-code-pro/files/source-code-pro-latin-wght-normal.woff2',
  weight: '200 900',
  variable: '--font-code',
  display: 'swap',
  adjustFontFallback: false,
  preload: false,
});
/** Relations, arrows, angle brackets and the sun sign, which the text faces lack. */
export const mathSigns = localFont({
  src: '../../node_modules/katex/dist/fonts/KaTeX_Main-Regular.woff2',
  weight: '400',
  variable: '--font-math',
  display: 'swap',
  adjustFontFallback: false,
  preload: false,
  declarations: [{ prop: 'unicode-range', value: 'U+2113, U+2190, U+2192, U+21D2, U+2200-2211, U+2213-22FF, U+27E8-27E9' }],
});

export const fontVariables = [serif, serifGreek, sans, sansGreek, sansExtended, code, mathSigns].map((face) => face.variable).join(' ');
