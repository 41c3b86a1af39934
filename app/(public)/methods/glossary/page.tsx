import type { Metadata } from 'next';
import { Prose } from '@/app/_ui/math/render-markdown';
import { readGlossary } from '../method-pages';
import { PageContents } from '../page-contents';
import { Trail } from '../trail';
import { parseGlossary, type GlossaryTerm } from './parse-glossary';

export const metadata: Metadata = { title: 'Glossary' };

export default async function GlossaryPage() {
  const glossary = parseGlossary(await readGlossary());
  return (
    <div className="wrap pt-10">
      <Trail here="glossary" />
      <div className="grid gap-x-16 gap-y-6 mid:grid-cols-[minmax(0,1fr)_200px]">
        <article className="min-w-0">
          <h1>{glossary.title}</h1>
          <div className="mt-3"><Prose source={glossary.lead} /></div>
          {glossary.parts.map((part) => (
            <section key={part.id} aria-labelledby={part.id} className="mt-8">
              <h2 id={part.id} className="scroll-mt-6">{part.heading}</h2>
              <dl className="mt-3 max-w-[60rem]">{part.terms.map((term) => <Term key={term.id} term={term} />)}</dl>
            </section>
          ))}
        </article>
        <div className="max-mid:order-first"><PageContents entries={glossary.parts.map(({ id, heading }) => ({ id, label: heading }))} /></div>
      </div>
    </div>
  );
}

/** The row of the address stands out, so that the eye finds what it came for. */
const Term = ({ term }: { readonly term: GlossaryTerm }) => (
  <div id={term.id} className="grid scroll-mt-6 gap-x-6 py-2 shadow-[inset_0_1px_var(--hair)] target:bg-hover sm:grid-cols-[14rem_minmax(0,1fr)] [&_.prose]:font-sans [&_.prose]:text-[15px]/[24px]">
    <dt className="font-semibold">{term.also.map((anchor) => <span key={anchor} id={anchor} />)}<Prose source={term.term} /></dt>
    <dd><Prose source={term.meaning} /></dd>
  </div>
);
