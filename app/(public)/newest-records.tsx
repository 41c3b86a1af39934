import { ClaimTable } from '../_ui/claim/claim-table';
import { LinkButton } from '../_ui/primitives/link-button';
import { Perforation } from '../_ui/primitives/perforation';
import { recordAsView } from '../views/record-as-view';
import type { Actor } from '@/lib/policy/actor';
import { getRecord } from '@/lib/services/records/get-record';
import type { RegisterRow } from '@/lib/services/records/record-view';
import { RegisterTable } from './register/register-table';

/** The newest record's own table as it stands in the register: no invented numbers on the front page. */
export async function NewestRecord({ actor, row }: { readonly actor: Actor; readonly row: RegisterRow | undefined }) {
  const record = row ? await getRecord(actor, row.id) : null;
  if (!record?.ok) return <EmptyTicket />;
  const view = recordAsView(record.value, null);
  return (
    <div className="meets">
      <ClaimTable view={{ ...view, claims: view.claims.slice(0, 3) }} closed />
      <p className="mt-2.5 flex flex-wrap justify-between gap-x-4 text-small text-ink-2">
        <span>The newest record: <a href={record.value.links.page}>{view.title}</a></span>
        {view.claims.length > 3 && <span>{view.claims.length - 3} more {view.claims.length === 4 ? 'claim' : 'claims'} in it</span>}
      </p>
    </div>
  );
}

/** Stands in its place until there is one. */
const EmptyTicket = () => (
  <div aria-hidden className="meets grid h-48 grid-cols-[43%_24px_1fr] border border-dashed border-control">
    <span className="bg-claimed-side" />
    <Perforation lies="never" />
    <span className="bg-sheet" />
  </div>
);

export function NewestRecords({ rows, total }: { readonly rows: readonly RegisterRow[]; readonly total: number }) {
  if (rows.length === 0) return null;
  return (
    <section className="wrap pt-16" aria-labelledby="newest">
      <div className="mb-3 flex flex-wrap items-baseline gap-x-3">
        <h2 id="newest">Newest records</h2>
        <LinkButton href="/register" tone="quiet" size="low" className="ml-auto">All {total} in the register</LinkButton>
      </div>
      <RegisterTable rows={rows} />
    </section>
  );
}
