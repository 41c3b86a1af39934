'use client';
import Link from 'next/link';
import type { Route } from 'next';
import { usePathname } from 'next/navigation';
import type { ReactNode } from 'react';

const look = 'flex min-h-9 items-center rounded px-3 py-2 text-ink-2 no-underline hover:bg-hover hover:text-ink aria-[current]:rounded-none aria-[current]:font-semibold aria-[current]:text-ink aria-[current]:shadow-[inset_0_-2px_var(--link)]';

interface NavLinkProps {
  readonly href: string;
  /** Another address that belongs to the same place, such as the composer to the submissions. */
  readonly also?: string | undefined;
  readonly children: ReactNode;
}

export function NavLink({ href, also, children }: NavLinkProps) {
  const path = usePathname();
  const within = [href, also].some((place) => place && path.startsWith(`${place}/`));
  const current = path === href ? ('page' as const) : within ? ('true' as const) : undefined;
  return <Link href={href as Route} className={look} aria-current={current}>{children}</Link>;
}
