import type { ReactNode } from 'react';
import Link from 'next/link';
import type { Route } from 'next';
import { Icon } from './icon';

const look = 'inline-flex min-h-[22px] items-center gap-1.5 whitespace-nowrap rounded border border-hair-2 bg-sheet px-[7px] text-small text-ink-2 no-underline';

export const Tag = ({ children }: { readonly children: ReactNode }) => <span className={look}>{children}</span>;

/** A filter that is on: the whole chip takes it off. */
export const RemovableTag = ({ href, label }: { readonly href: string; readonly label: string }) => (
  <Link href={href as Route} className={`${look} min-h-8 px-2.5 text-ink hover:bg-hover`} aria-label={`Remove: ${label}`}>
    {label}
    <Icon name="close" className="size-2.5" />
  </Link>
);
