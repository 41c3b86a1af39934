import type { ReactNode } from 'react';
import { classes } from './classes';

interface CardProps {
  readonly title?: ReactNode;
  readonly aside?: ReactNode;
  readonly claimedSide?: boolean;
  readonly level?: 2 | 3;
  readonly children: ReactNode;
}

export function Card({ title, aside, claimedSide, level = 3, children }: CardProps) {
  const Heading = `h${level}` as 'h2' | 'h3';
  return (
    <section className={classes('min-w-0 rounded border border-hair-2 px-5 py-4', claimedSide ? 'bg-claimed-side' : 'bg-sheet')}>
      {title && (
        <div className="mb-3 flex flex-wrap items-baseline gap-x-3 gap-y-1">
          <Heading className="text-h3">{title}</Heading>
          {aside && <span className="ml-auto text-ui text-ink-2">{aside}</span>}
        </div>
      )}
      {children}
    </section>
  );
}
