import Link from 'next/link';
import type { ReactNode } from 'react';
import { Logo } from './logo';
import { NavLink } from './nav-link';
import { SkipLink } from './skip-link';
import { ThemeSwitch } from './theme-switch';
import type { Theme } from './theme';
import { LinkButton } from './link-button';
import { Icon } from './icon';

export interface NavEntry {
  readonly href: string;
  readonly label: string;
  readonly also?: string;
  /** Things that wait there, said in the link's name. */
  readonly count?: number;
}

interface SiteHeaderProps {
  readonly nav: readonly NavEntry[];
  readonly person: { readonly name: string; readonly accountHref: string } | null;
  readonly signInHref: string;
  readonly theme: Theme;
  /** E.g. the sign-out form. */
  readonly end?: ReactNode;
}

export function SiteHeader({ nav, person, signInHref, theme, end }: SiteHeaderProps) {
  return (
    <>
      <SkipLink />
      <header className="site-bar sticky top-0 z-10 bg-page shadow-[inset_0_-1px_var(--hair-2)]">
        <div className="wrap flex min-h-14 flex-wrap items-center gap-x-4 gap-y-0">
          <Link href="/" className="inline-flex min-h-10 items-center gap-2 font-serif text-[19px]/[24px] font-semibold text-ink no-underline">
            <Logo className="size-7 text-link" />
            Counterfoil
          </Link>
          <nav aria-label="Main" className="ml-2 flex gap-1 text-ui max-stack:order-3 max-stack:-mx-3 max-stack:w-[calc(100%+24px)] max-stack:overflow-x-auto">
            {nav.map((entry) => (
              <NavLink key={entry.href} href={entry.href} also={entry.also}>
                {entry.label}
                {entry.count ? <span className="ml-1.5 rounded border border-hair-2 px-1 text-micro text-ink-2">{entry.count}<span className="sr-only"> waiting</span></span> : null}
              </NavLink>
            ))}
          </nav>
          <div className="ml-auto flex items-center gap-2 text-ui">
            <ThemeSwitch theme={theme} />
            {person ? (
              <LinkButton href={person.accountHref} tone="quiet" size="low" icon={<Icon name="person" />} className="text-ink">
                <span className="max-sm:sr-only">{person.name}</span>
              </LinkButton>
            ) : (
              <LinkButton href={signInHref} size="low">Sign in</LinkButton>
            )}
            {end}
          </div>
        </div>
      </header>
    </>
  );
}
