import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { Formula } from '@/app/_ui/math/formula';
import { Prose } from '@/app/_ui/math/render-markdown';
import type { Quantity } from '@/lib/engine/contract/quantity';
import { quantities } from '@/lib/engine/quantities/registry';
import { findMethodPage } from '../method-pages';
import { MethodSettings } from '../method-settings';
import { PageContents } from '../page-contents';
import { SETTINGS_HEADING, type MethodPage, type MethodSection } from '../parse-method-page';
import { Trail } from '../trail';

interface MethodProps {
  readonly params: Promise<{ readonly quantity: string }>;
}

export async function generateMetadata({ params }: MethodProps): Promise<Metadata> {
  const page = await findMethodPage((await params).quantity);
  return { title: page ? `${page.title}, how it is computed` : 'Nothing here' };
}

/** A page without its quantity, or the other way round, is none: what is described is what runs. */
export default async function MethodOfQuantity({ params }: MethodProps) {
  const { quantity: id } = await params;
  const [page, quantity] = [await findMethodPage(id), quantities.get(id)];
  if (!page || !quantity) notFound();
  return (
    <div className="wrap pt-10">
      <Trail here={page.id} />
      <div className="grid gap-x-16 gap-y-6 mid:grid-cols-[minmax(0,1fr)_200px]">
        <article className="min-w-0">
          <h1>{page.title}</h1>
          <div className="mt-3"><Prose source={page.summary} /></div>
          <AsUsed quantity={quantity} />
          <div className="mt-4"><Prose source={page.lead} /></div>
          {page.sections.map((section) => <Section key={section.id} section={section} page={page} quantity={quantity} />)}
          <WhatItDoesNotSay />
        </article>
        <div className="max-mid:order-first"><PageContents entries={[...page.sections.map(({ id: anchor, heading }) => ({ id: anchor, label: heading })), { id: 'not-said', label: 'What verified does not mean' }]} /></div>
      </div>
    </div>
  );
}

/** The engine's own line, printed beside every number of this quantity. */
const AsUsed = ({ quantity }: { readonly quantity: Quantity }) => (
  <figure className="mt-4 max-w-measure border-l-2 border-control pl-4">
    <figcaption className="text-small text-ink-2">As the engine uses it, and prints it beside each number. On a sheet: <code className="font-code text-code">{`"quantity": "${quantity.id}"`}</code></figcaption>
    <Formula display label={`Formula of ${quantity.title.toLowerCase()}`} tex={quantity.formula} />
  </figure>
);

const Section = ({ section, page, quantity }: { readonly section: MethodSection; readonly page: MethodPage; readonly quantity: Quantity }) => (
  <section aria-labelledby={section.id} className="mt-8">
    <h2 id={section.id} className="scroll-mt-6">{section.heading}</h2>
    {section.heading === SETTINGS_HEADING ? <MethodSettings quantity={quantity} notes={page.notes} /> : <div className="mt-3"><Prose source={section.body} /></div>}
  </section>
);

const WhatItDoesNotSay = () => (
  <section aria-labelledby="not-said" className="mt-8">
    <h2 id="not-said" className="scroll-mt-6">What verified does not mean</h2>
    <p className="mt-3 max-w-measure font-serif text-prose">That a number of this kind was recomputed says that it follows from these files and settings. It does not say that the simulation is accurate, that the source exists or that the conclusion is right. <Link href="/#means">The whole promise, with both its halves</Link>; the conventions that every number here rests on: <Link href="/methods/house-conventions">house conventions</Link>.</p>
  </section>
);
