import type { Metadata } from 'next';
import { readFile } from 'node:fs/promises';
import Link from 'next/link';
import path from 'node:path';
import { cache } from 'react';
import { Prose } from '@/app/_ui/math/render-markdown';
import { PageContents } from '../page-contents';
import { parseMethodPage } from '../parse-method-page';
import { Trail } from '../trail';
import { withValues } from './convention-values';

export const metadata: Metadata = { title: 'House conventions', description: 'Signs, units, constants and rules on which every recomputed number rests.' };

const read = cache(async () => parseMethodPage('house-conventions', withValues(await readFile(path.join(process.cwd(), 'content', 'conventions.md'), 'utf8'))));

export default async function Conventions() {
  const page = await read();
  return (
    <div className="wrap pt-10">
      <Trail here="house conventions" />
      <div className="grid gap-x-16 gap-y-6 mid:grid-cols-[minmax(0,1fr)_240px]">
        <article className="min-w-0">
          <h1>{page.title}</h1>
          <div className="mt-3"><Prose source={page.summary} /></div>
          <p className="mt-3 max-w-measure font-serif text-prose">What others may mean by the same words, and what that does to a number, stands in the <Link href="/methods/conventions">catalogue of conventions</Link>.</p>
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
