import { LinkButton } from '@/app/_ui/primitives/link-button';
import type { RegisterView } from '@/lib/services/records/read-register';
import { registerHref } from './register-address';

interface PagesProps {
  readonly view: RegisterView;
  readonly pageSize: number;
}

export function PagesNav({ view: { query, rows, total, pages }, pageSize }: PagesProps) {
  if (pages === 1 || rows.length === 0) return null;
  const first = (query.page - 1) * pageSize + 1;
  return (
    <nav aria-label="Pages of the register" className="flex flex-wrap items-center justify-between gap-3 pt-4 text-ui shadow-[inset_0_1px_var(--hair-2)]">
      <span className="text-ink-2">{first} to {first + rows.length - 1} of {total}, page {query.page} of {pages}</span>
      <span className="flex gap-2">
        <Step label="Previous" page={query.page - 1} open={query.page > 1} query={query} />
        <Step label="Next" page={query.page + 1} open={query.page < pages} query={query} />
      </span>
    </nav>
  );
}

function Step({ label, page, open, query }: { readonly label: string; readonly page: number; readonly open: boolean; readonly query: RegisterView['query'] }) {
  if (!open) return <span className="inline-flex min-h-8 items-center px-3 text-ink-2">{label}</span>;
  return <LinkButton href={registerHref({ ...query, page })} size="low">{label}</LinkButton>;
}
