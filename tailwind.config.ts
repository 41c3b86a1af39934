import type { Config } from 'tailwindcss';
import plugin from 'tailwindcss/plugin';
import { asCustomProperties, dark, light, tokenNames } from './app/_ui/tokens';

/*
 * Two whole theme blocks instead of light-dark(): a custom property then holds a plain colour,
 * which a canvas can read, and browsers older than 2024 see the dark theme too.
 */
const themes = plugin(({ addBase }) => {
  addBase({
    ':root': { 'color-scheme': 'light', ...asCustomProperties(light) },
    '@media (prefers-color-scheme: dark)': { ':root:not([data-theme="light"])': { 'color-scheme': 'dark', ...asCustomProperties(dark) } },
    ':root[data-theme="dark"]': { 'color-scheme': 'dark', ...asCustomProperties(dark) },
  });
});

const sans = 'var(--font-sans), var(--font-sans-greek), var(--font-sans-ext), var(--font-math), "Segoe UI", sans-serif';
const serif = 'var(--font-serif), var(--font-serif-greek), var(--font-math), Georgia, serif';

export default {
  content: ['./app/**/*.{ts,tsx}'],
  theme: {
    screens: { sm: '641px', stack: '861px', mid: '1101px', full: '1241px' },
    colors: {
      inherit: 'inherit',
      current: 'currentColor',
      transparent: 'transparent',
      ...Object.fromEntries(tokenNames.map((name) => [name, `var(--${name})`])),
    },
    fontFamily: { sans, serif, code: 'var(--font-code), ui-monospace, monospace' },
    fontSize: {
      micro: ['12px', '16px'],
      code: ['12.5px', '20px'],
      small: ['13px', '20px'],
      ui: ['14px', '20px'],
      input: ['15px', '20px'],
      cell: ['15px', '24px'],
      text: ['16px', '24px'],
      prose: ['17px', '28px'],
      number: ['18px', '24px'],
      h3: ['18px', '24px'],
      lead: ['18px', '28px'],
      h2: ['22px', '28px'],
      h1: ['28px', '36px'],
      display: ['44px', '52px'],
      hero: ['56px', '60px'],
    },
    borderRadius: { none: '0', DEFAULT: '2px' },
    extend: {
      maxWidth: { measure: '68ch', wrap: '1320px' },
      transitionDuration: { quick: '120ms', calm: '240ms' },
    },
  },
  plugins: [themes],
} satisfies Config;
