import type { ReactNode } from 'react';

/** One part of the account page: what it is about on the left, what can be done on the right. */
export const Group = ({ id, title, hint, children }: { readonly id: string; readonly title: string; readonly hint: string; readonly children: ReactNode }) => (
  <section aria-labelledby={id} className="grid gap-x-10 gap-y-3 stack:grid-cols-[220px_minmax(0,1fr)]">
    <div><h2 id={id}>{title}</h2><p className="mt-1 text-small text-ink-2">{hint}</p></div>
    <div className="min-w-0">{children}</div>
  </section>
);
