import Link from 'next/link';
import type { Route } from 'next';
import { ClaimTable } from '../_ui/claim/claim-table';
import { LinkButton } from '../_ui/primitives/link-button';
import { Perforation } from '../_ui/primitives/perforation';
import { formatDay } from '../views/dates';
import { recordAsView } from '../views/record-as-view';
import type { Actor } from '@/lib/policy/actor';
import { getRecord } from '@/lib/services/records/get-record';
import type { RecordView, RegisterRow } from '@/lib/services/records/record-view';
import { RegisterTable } from './register/register-table';

const shown = 3;

/** The newest record's own table as it stands in the register: no invented numbers on the front page. */
export async function LiveRecord({ actor, row }: { readonly actor: Actor; readonly row: RegisterRow | undefined }) {
  const record = row ? await getRecord(actor, row.id) : null;
  if (!record?.ok) return <NoRecordYet />;
  const view = recordAsView(record.value, null);
  return (
    <div className="meets">
      <ClaimTable view={{ ...view, claims: view.claims.slice(0, shown) }} closed />
      <Caption record={record.value} more={view.claims.length - shown} />
    </div>
  );
}

function Caption({ record: { document, links }, more }: { readonly record: RecordView; readonly more: number }) {
  return (
    <div className="mt-2.5 flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 text-small text-ink-2">
      <p>
        From the register: <Link href={links.page as Route}>{document.title}</Link>, by {document.authors.join(', ')}. Entered {formatDay(document.enteredAt)} at level {document.decision.level}.
        {more > 0 && ` ${more} more ${more === 1 ? 'claim' : 'claims'} in it.`}
      </p>
      <p><a href={links.bundle} download className="inline-flex min-h-8 items-center">Download it signed</a>, to check it without asking us</p>
    </div>
  );
}

/** Stands in its place until there is one: the two halves, each saying what will be in it. */
const NoRecordYet = () => (
  <section aria-labelledby="no-record" className="meets">
    <div className="grid border border-dashed border-control stack:grid-cols-[43%_24px_1fr]">
      <div className="bg-claimed-side p-5 sm:p-7"><p className="text-small font-semibold text-ink-2">Claimed</p><p className="mt-1 max-w-[36ch] font-serif text-lead">What the authors print, as they print it.</p></div>
      <Perforation />
      <div className="bg-sheet p-5 sm:p-7"><p className="text-small font-semibold text-ink-2">Recomputed</p><p className="mt-1 max-w-[44ch] font-serif text-lead">What the server gets from the same files, with its uncertainty and its verdict.</p></div>
    </div>
    <p className="mt-2.5 text-small text-ink-2"><span id="no-record">No record has been entered yet.</span> The newest one will stand here. <a href="#how" className="inline-flex min-h-8 items-center">How a record comes to be</a></p>
  </section>
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
