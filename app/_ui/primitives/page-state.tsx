import type { ReactNode } from 'react';
import { Perforation } from './perforation';
import { classes } from './classes';

interface StateProps {
  /** What is. */
  readonly title: string;
  /** Why, and what comes next. */
  readonly children?: ReactNode;
  readonly actions?: ReactNode;
  /** Heading level, so that the page's outline holds. */
  readonly level?: 1 | 2 | 3;
  readonly reference?: string;
}

function Body({ title, children, actions, level = 2, reference }: StateProps) {
  const Heading = `h${level}` as 'h1' | 'h2' | 'h3';
  return (
    <>
      <Heading className="text-[20px]/[28px]">{title}</Heading>
      {children && <div className="grid max-w-[60ch] gap-2 text-ink-2">{children}</div>}
      {actions && <div className="mt-1 flex flex-wrap gap-2">{actions}</div>}
      {reference && <p className="mt-2 border-t border-hair-2 pt-3 font-code text-code text-ink-2">{reference}</p>}
    </>
  );
}

/** Nothing yet: a ticket drawn in outline, the next step named. */
export const EmptyState = (props: StateProps) => (
  <section className="grid gap-2.5 rounded border border-hair-2 bg-sheet p-5 sm:px-8 sm:py-7">
    <div aria-hidden className="mb-2 grid h-24 max-w-[560px] grid-cols-[1fr_24px_1fr] border border-dashed border-control">
      <span className="bg-claimed-side" />
      <Perforation lies="never" />
      <span className="bg-sheet" />
    </div>
    <Body {...props} />
  </section>
);

/** A search with no result, a fault, an end: a plain frame. */
export const PlainState = (props: StateProps) => (
  <section className="grid gap-2.5 rounded border border-hair-2 bg-sheet p-5 sm:px-8 sm:py-7"><Body {...props} /></section>
);

export const ErrorState = ({ reference, ...props }: StateProps) => <PlainState {...props} reference={reference} />;

export const Skeleton = ({ width, tall, className }: { readonly width: string; readonly tall?: boolean; readonly className?: string }) => (
  <span aria-hidden className={classes('skeleton max-w-full', className)} style={{ width, ...(tall ? { height: '20px' } : {}) }} />
);

/** Grey bars in the shape of a list; what is coming is said once to screen readers. */
export function LoadingList({ what, rows = 4 }: { readonly what: string; readonly rows?: number }) {
  const widths = ['34ch', '28ch', '40ch', '24ch'];
  return (
    <div aria-busy="true" className="min-w-0 overflow-hidden">
      <span role="status" className="sr-only">Loading {what}</span>
      {Array.from({ length: rows }, (_, i) => (
        <div key={i} className="flex min-h-12 items-center gap-6 shadow-[inset_0_-1px_var(--hair)]">
          <Skeleton width={widths[i % widths.length] ?? '30ch'} />
          <Skeleton width="9ch" className="ml-auto" />
        </div>
      ))}
    </div>
  );
}
