import type { Metadata } from 'next';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { EmptyState, PlainState } from '@/app/_ui/primitives/page-state';
import { RemovableTag } from '@/app/_ui/primitives/tag';
import { loadForAnyone } from '@/lib/http/page-guard';
import { listRecords } from '@/lib/services/records/list-records';
import { FilterForm } from './filter-form';
import { quantityWord } from '@/app/views/quantity-word';
import { verdictWord } from './filter-words';
import { isFiltered, parseFilter, registerHref, type Filter, type SearchParams } from './register-filter';
import { RegisterTable } from './register-table';

export const metadata: Metadata = { title: 'Register', description: 'Records of recomputed claims, each with its verdicts.' };

/** The filters that are on; each can be taken off by itself, which the address then shows. */
const filterTags = (filter: Filter) => [
  ...(filter.text ? [{ label: `contains “${filter.text}”`, href: registerHref({ ...filter, text: undefined }) }] : []),
  ...(filter.quantity ? [{ label: quantityWord(filter.quantity), href: registerHref({ ...filter, quantity: undefined }) }] : []),
  ...(filter.verdict ? [{ label: `a claim that ${verdictWord(filter.verdict)}`, href: registerHref({ ...filter, verdict: undefined }) }] : []),
];

export default async function Register({ searchParams }: { readonly searchParams: Promise<SearchParams> }) {
  const filter = parseFilter(await searchParams);
  const all = await loadForAnyone((actor) => listRecords(actor));
  const rows = isFiltered(filter) ? await loadForAnyone((actor) => listRecords(actor, filter)) : all;
  const quantities = [...new Set(all.flatMap((row) => row.quantities))].sort();
  return (
    <div className="wrap pt-10">
      <h1>Register</h1>
      <p className="mt-1 max-w-measure text-ink-2">Claims that were recomputed from their own files, questioned by referees and entered by an editor. Struck records stay here, marked as such.</p>
      <FilterForm filter={filter} quantities={quantities} />
      {all.length === 0 ? (
        <EmptyState title="No record yet" actions={<LinkButton href="/methods">How a record comes to be</LinkButton>}><p>The first one appears here when an editor enters it.</p></EmptyState>
      ) : (
        <section aria-label="Results">
          <div className="my-4 flex flex-wrap items-center gap-2 text-ui">
            <b role="status">{rows.length} {rows.length === 1 ? 'record' : 'records'}</b>
            {filterTags(filter).map((tag) => <RemovableTag key={tag.label} {...tag} />)}
          </div>
          {rows.length > 0 ? <RegisterTable rows={rows} /> : <PlainState title="No record has all of these" actions={<LinkButton href="/register">Clear all filters</LinkButton>}><p>Take one filter off above, or clear them all: there {all.length === 1 ? 'is 1 record' : `are ${all.length} records`} without any.</p></PlainState>}
        </section>
      )}
    </div>
  );
}
