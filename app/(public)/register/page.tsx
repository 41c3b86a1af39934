import type { Metadata } from 'next';
import Link from 'next/link';
import { cache } from 'react';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { Notice } from '@/app/_ui/primitives/notice';
import { EmptyState, PlainState } from '@/app/_ui/primitives/page-state';
import { RemovableTag } from '@/app/_ui/primitives/tag';
import { formatProblem } from '@/lib/kernel/problem';
import { loadActor, orNotFound } from '@/lib/http/page-guard';
import { PAGE_SIZE, readRegister, type RegisterView } from '@/lib/services/records/read-register';
import { isAsking, type AddressParams } from '@/lib/services/records/register-query';
import { FilterForm } from './filter-form';
import { orderWord } from './filter-words';
import { PagesNav } from './pages-nav';
import { changedHref, exportHref, filterTags, registerHref } from './register-address';
import { RegisterTable } from './register-table';

interface RegisterProps {
  readonly searchParams: Promise<AddressParams>;
}

/** Asked by the head and by the body of the page, read once. */
const read = cache(async (searchParams: Promise<AddressParams>) => orNotFound(await readRegister(await loadActor(), await searchParams)));

export async function generateMetadata({ searchParams }: RegisterProps): Promise<Metadata> {
  const { query } = await read(searchParams);
  return {
    title: 'Register',
    description: 'Records of recomputed claims, each with its verdicts.',
    alternates: { types: { 'application/atom+xml': [{ url: exportHref('feed.atom', query.ask), title: 'Records as a feed' }], 'text/csv': [{ url: exportHref('records.csv', query.ask), title: 'Claims as a table' }] } },
  };
}

export default async function Register({ searchParams }: RegisterProps) {
  const view = await read(searchParams);
  const tags = filterTags(view.query);
  return (
    <div className="wrap pt-10">
      <h1>Register</h1>
      <p className="mt-1 max-w-measure text-ink-2">Claims that were recomputed from their own files, questioned by referees and entered by an editor. Nothing is ever removed: a <Link href="/methods/glossary#struck">struck</Link> record stays here, marked as such.</p>
      <FilterForm query={view.query} choices={view.choices} filtersOn={tags.length - (view.query.ask.text === undefined ? 0 : 1)} />
      {view.problems.length > 0 && <NotUnderstood problems={view.problems} />}
      {view.everything === 0 ? <NoRecordYet /> : <Results view={view} tags={tags} />}
    </div>
  );
}

const NotUnderstood = ({ problems }: { readonly problems: RegisterView['problems'] }) => (
  <div className="mt-4">
    <Notice kind="ask" word="Left off" live="status">
      <p className="font-semibold">{problems.length === 1 ? 'One part of this address is not understood.' : `${problems.length} parts of this address are not understood.`}</p>
      <ul className="mt-1 grid gap-1">{problems.map((problem) => <li key={problem.code + problem.where} className="break-words">{formatProblem({ ...problem, where: problem.where.slice(1) })}</li>)}</ul>
    </Notice>
  </div>
);

const NoRecordYet = () => (
  <div className="mt-6"><EmptyState title="No record yet" actions={<LinkButton href="/#how">How a record comes to be</LinkButton>}><p>The first one appears here when an editor enters it.</p></EmptyState></div>
);

function Results({ view, tags }: { readonly view: RegisterView; readonly tags: ReturnType<typeof filterTags> }) {
  const { query, rows, total } = view;
  const order = { now: query.order, hrefFor: (next: typeof query.order) => changedHref(query, {}, next) };
  return (
    <section aria-label="Results">
      <div className="my-4 flex flex-wrap items-center gap-2 text-ui">
        <b role="status">{total} {total === 1 ? 'record' : 'records'}</b>
        {tags.map((tag) => <RemovableTag key={tag.label} {...tag} />)}
        <span className="ml-auto flex gap-1">
          <LinkButton href={exportHref('records.csv', query.ask)} tone="quiet" size="low" download>CSV</LinkButton>
          <LinkButton href={exportHref('feed.atom', query.ask)} tone="quiet" size="low" external>Feed</LinkButton>
        </span>
      </div>
      {rows.length > 0 ? <RegisterTable rows={rows} caption={`Records, ordered by ${orderWord(query.order)}`} order={order} /> : <NothingHere view={view} />}
      <PagesNav view={view} pageSize={PAGE_SIZE} />
    </section>
  );
}

function NothingHere({ view: { query, total, everything, pages } }: { readonly view: RegisterView }) {
  if (total > 0) return <PlainState title="No such page" actions={<LinkButton href={registerHref({ ...query, page: pages })}>Go to the last page</LinkButton>}><p>The search has {total} {total === 1 ? 'record' : 'records'}, which end on page {pages}.</p></PlainState>;
  const reach = everything === 1 ? 'there is 1 record' : `there are ${everything} records`;
  return <PlainState title={isAsking(query.ask) ? 'No record has all of these' : 'No record here'} actions={<LinkButton href="/register">Clear all filters</LinkButton>}><p>Take one filter off above, or clear them all: {reach} without any. Quantity, verdict and noise curve are asked of one and the same claim.</p></PlainState>;
}
