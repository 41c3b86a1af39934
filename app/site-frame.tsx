import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { ENGINE_VERSION } from '@/lib/engine/version';
import { loadActor } from '@/lib/http/page-guard';
import { isSignedIn, type Actor } from '@/lib/policy/actor';
import { SiteFooter } from './_ui/primitives/site-footer';
import { SiteHeader, type NavEntry } from './_ui/primitives/site-header';
import { parseTheme, themeCookie } from './_ui/primitives/theme';
import { Toaster } from './_ui/primitives/toaster';

const everyone: readonly NavEntry[] = [
  { href: '/register', label: 'Register' },
  { href: '/methods', label: 'Methods' },
];
const members: readonly NavEntry[] = [
  { href: '/submissions', label: 'Submissions', also: '/compose' },
  { href: '/desk', label: 'Desk', also: '/review' },
];

/** A link is only a convenience: who may open what is asked again behind every door. */
export function navFor(actor: Actor): readonly NavEntry[] {
  if (!isSignedIn(actor)) return everyone;
  const isEditor = actor.kind === 'member' && actor.accountRole === 'editor';
  return [...everyone, ...members, ...(isEditor ? [{ href: '/queue', label: 'Queue' }] : [])];
}

const footLinks = [
  { href: '/methods', label: 'How a verdict is made' },
  { href: '/methods/conventions', label: 'Conventions' },
  { href: '/methods/noise', label: 'Noise curves' },
  { href: '/methods/glossary', label: 'Glossary' },
  { href: '/interface', label: 'Interface' },
] as const;

/** Header, main and footer of every page but the one that is not there. */
export async function SiteFrame({ children }: { readonly children: ReactNode }) {
  const actor = await loadActor();
  const theme = parseTheme((await cookies()).get(themeCookie)?.value);
  return (
    <>
      <SiteHeader nav={navFor(actor)} person={isSignedIn(actor) && actor.kind === 'member' ? { name: actor.name, accountHref: '/account' } : null} signInHref="/sign-in" theme={theme} />
      <main id="main" tabIndex={-1} className="outline-none">{children}</main>
      <SiteFooter engine={ENGINE_VERSION} links={footLinks} />
      <Toaster />
    </>
  );
}
