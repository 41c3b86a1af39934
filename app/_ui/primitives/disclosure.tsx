import type { ReactNode } from 'react';
import { classes } from './classes';
import { Icon } from './icon';

interface DisclosureProps {
  readonly summary: ReactNode;
  readonly children: ReactNode;
  readonly open?: boolean;
  readonly className?: string;
}

/** The browser's own disclosure: it opens without script and is found by a page search. */
export function Disclosure({ summary, children, open, className }: DisclosureProps) {
  return (
    <details open={open} className={classes('group/d', className)}>
      <summary className="inline-flex min-h-8 cursor-pointer list-none items-center gap-2 rounded py-1 pr-2 text-ui font-semibold text-link hover:bg-hover [&::-webkit-details-marker]:hidden">
        <Icon name="open" className="size-3 transition-transform duration-quick group-open/d:rotate-90" />
        {summary}
      </summary>
      <div className="pt-2">{children}</div>
    </details>
  );
}
