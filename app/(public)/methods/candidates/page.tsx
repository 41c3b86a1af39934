import type { Metadata } from 'next';
import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { cache } from 'react';
import { Prose } from '@/app/_ui/math/render-markdown';
import { PageContents } from '../page-contents';
import { parseMethodPage } from '../parse-method-page';
import { Trail } from '../trail';
import { CalibrationTables, type Calibration } from './calibration-tables';

export const metadata: Metadata = { title: 'Would agree if', description: 'How the server looks for the reading that would close a gap, and how often it errs.' };

const content = (name: string): Promise<string> => readFile(path.join(process.cwd(), 'content', name), 'utf8');
const read = cache(async () => ({ page: parseMethodPage('would agree if', await content('candidates.md')), rates: JSON.parse(await content('explain-calibration.json')) as Calibration }));

export default async function Candidates() {
  const { page, rates } = await read();
  return (
    <div className="wrap pt-10">
      <Trail here="would agree if" />
      <div className="grid gap-x-16 gap-y-6 mid:grid-cols-[minmax(0,1fr)_240px]">
        <article className="min-w-0">
          <h1>{page.title}</h1>
          <div className="mt-3"><Prose source={page.summary} /></div>
          {page.sections.map((section) => (
            <section key={section.id} aria-labelledby={section.id} className="mt-8">
              <h2 id={section.id} className="scroll-mt-6">{section.heading}</h2>
              <div className="mt-3"><Prose source={section.body} /></div>
              {section.heading === 'How it was checked' && <CalibrationTables {...rates} />}
            </section>
          ))}
        </article>
        <div className="max-mid:order-first"><PageContents entries={page.sections.map(({ id, heading }) => ({ id, label: heading }))} /></div>
      </div>
    </div>
  );
}
