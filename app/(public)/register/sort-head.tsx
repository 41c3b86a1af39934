import type { Route } from 'next';
import Link from 'next/link';
import type { RegisterOrder } from '@/lib/services/records/register-query';

export interface TableOrder {
  readonly now: RegisterOrder;
  readonly hrefFor: (order: RegisterOrder) => string;
}

type Column = 'title' | 'date';
const ariaOf = (by: Column, now: RegisterOrder | undefined) => {
  if (by === 'title') return now === 'title' ? ('ascending' as const) : undefined;
  return now === 'newest' ? ('descending' as const) : now === 'oldest' ? ('ascending' as const) : undefined;
};
const nextOf = (by: Column, now: RegisterOrder): RegisterOrder => (by === 'title' ? 'title' : now === 'newest' ? 'oldest' : 'newest');

/** A column head that sorts by being followed; on a phone, where heads are not seen, the form's order does. */
export function SortHead({ label, by, order, className = '' }: { readonly label: string; readonly by: Column; readonly order?: TableOrder | undefined; readonly className?: string }) {
  if (!order) return <th role="columnheader" scope="col" className={className}>{label}</th>;
  const sorted = ariaOf(by, order.now);
  return (
    <th role="columnheader" scope="col" aria-sort={sorted} className={className}>
      <span className="sm:hidden">{label}</span>
      <Link href={order.hrefFor(nextOf(by, order.now)) as Route} className="inline-flex min-h-8 items-center gap-1 rounded text-ink-2 no-underline hover:bg-hover hover:text-ink max-sm:hidden">
        {label}
        <span aria-hidden className="w-3 text-link">{sorted === undefined ? '' : sorted === 'descending' ? '↓' : '↑'}</span>
      </Link>
    </th>
  );
}
