import Link from 'next/link';
import type { Route } from 'next';
import type { ReactNode } from 'react';
import { buttonClasses, type ButtonSize, type ButtonTone } from './button';

interface LinkButtonProps {
  readonly href: string;
  readonly tone?: ButtonTone;
  readonly size?: ButtonSize;
  readonly icon?: ReactNode;
  readonly className?: string;
  /** A file or another site: an ordinary link, no client navigation. */
  readonly external?: boolean;
  readonly download?: boolean;
  readonly children: ReactNode;
}

export function LinkButton({ href, tone, size, icon, className, external, download, children }: LinkButtonProps) {
  const look = buttonClasses(tone, size, className);
  if (external || download) return <a className={look} href={href} download={download}>{icon}{children}</a>;
  return <Link className={look} href={href as Route}>{icon}{children}</Link>;
}
