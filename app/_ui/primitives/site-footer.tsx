import Link from 'next/link';
import type { Route } from 'next';
import { Shortcuts } from './shortcuts';

interface SiteFooterProps {
  readonly engine: string;
  readonly links: readonly { readonly href: string; readonly label: string }[];
}

export function SiteFooter({ engine, links }: SiteFooterProps) {
  return (
    <footer className="site-foot mt-16 text-small text-ink-2 shadow-[inset_0_1px_var(--hair-2)]">
      <div className="wrap flex flex-wrap items-center gap-x-6 gap-y-1 pt-6 pb-10">
        <span>Counterfoil · engine {engine}</span>
        {links.map((link) => <Link key={link.href} href={link.href as Route} className="inline-flex min-h-8 items-center text-ink-2">{link.label}</Link>)}
        <Shortcuts />
        <span className="stack:ml-auto">The machine reads; only the editor enters.</span>
      </div>
    </footer>
  );
}
