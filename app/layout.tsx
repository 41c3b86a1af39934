import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import { NuqsAdapter } from 'nuqs/adapters/next/app';
import type { ReactNode } from 'react';
import { parseTheme, themeCookie } from './_ui/primitives/theme';
import { dark, light } from './_ui/tokens';
import { fontVariables } from './fonts/faces';
import './globals.css';

export const metadata: Metadata = {
  title: { default: 'Counterfoil', template: '%s · Counterfoil' },
  description: 'Claimed numbers of waveform comparison, recomputed from their own files and set side by side.',
  icons: { icon: { url: '/favicon.svg', type: 'image/svg+xml' } },
};

export const viewport: Viewport = {
  colorScheme: 'light dark',
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: light.page },
    { media: '(prefers-color-scheme: dark)', color: dark.page },
  ],
};

/** Reading the cookie makes every page dynamic, which the nonce of the security policy needs anyway. */
export default async function RootLayout({ children }: { readonly children: ReactNode }) {
  const theme = parseTheme((await cookies()).get(themeCookie)?.value);
  return (
    <html lang="en" data-theme={theme === 'system' ? undefined : theme} className={fontVariables}>
      <body><NuqsAdapter>{children}</NuqsAdapter></body>
    </html>
  );
}
