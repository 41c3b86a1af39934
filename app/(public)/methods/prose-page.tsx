import type { ReactNode } from 'react';
import { Prose } from '@/app/_ui/math/render-markdown';
import { PageContents } from './page-contents';
import type { MethodPage } from './parse-method-page';
import { Trail } from './trail';

interface ProsePageProps {
  readonly page: MethodPage;
  /** Where the reader is, in the trail. */
  readonly here: string;
  /** Under the summary. */
  readonly lead?: ReactNode;
  /** Under the text of a section, by its heading. */
  readonly under?: Readonly<Record<string, ReactNode>>;
}

/** A page of `content/` that is text with headings, with its contents beside it. */
export function ProsePage({ page, here, lead, under = {} }: ProsePageProps) {
  return (
    <div className="wrap pt-10">
      <Trail here={here} />
      <div className="grid gap-x-16 gap-y-6 mid:grid-cols-[minmax(0,1fr)_240px]">
        <article className="min-w-0">
          <h1>{page.title}</h1>
          <div className="mt-3"><Prose source={page.summary} /></div>
          {lead}
          {page.sections.map((section) => (
            <section key={section.id} aria-labelledby={section.id} className="mt-8">
              <h2 id={section.id} className="scroll-mt-6">{section.heading}</h2>
              <div className="mt-3"><Prose source={section.body} /></div>
              {under[section.heading]}
            </section>
          ))}
        </article>
        <div className="max-mid:order-first"><PageContents entries={page.sections.map(({ id, heading }) => ({ id, label: heading }))} /></div>
      </div>
    </div>
  );
}
