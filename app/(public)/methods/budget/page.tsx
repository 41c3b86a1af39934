import type { Metadata } from 'next';
import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { cache } from 'react';
import { Prose } from '@/app/_ui/math/render-markdown';
import { PageContents } from '../page-contents';
import { parseMethodPage } from '../parse-method-page';
import { Trail } from '../trail';

export const metadata: Metadata = { title: 'Error budget', description: 'What could have moved a recomputed number, how each part is estimated and how they are combined.' };

const read = cache(async () => parseMethodPage('error budget', await readFile(path.join(process.cwd(), 'content', 'error-budget.md'), 'utf8')));

export default async function ErrorBudget() {
  const page = await read();
  return (
    <div className="wrap pt-10">
      <Trail here="error budget" />
      <div className="grid gap-x-16 gap-y-6 mid:grid-cols-[minmax(0,1fr)_240px]">
        <article className="min-w-0">
          <h1>{page.title}</h1>
          <div className="mt-3"><Prose source={page.summary} /></div>
          {page.sections.map((section) => (
            <section key={section.id} aria-labelledby={section.id} className="mt-8">
              <h2 id={section.id} className="scroll-mt-6">{section.heading}</h2>
              <div className="mt-3"><Prose source={section.body} /></div>
            </section>
          ))}
        </article>
        <div className="max-mid:order-first"><PageContents entries={page.sections.map(({ id, heading }) => ({ id, label: heading }))} /></div>
      </div>
    </div>
  );
}
