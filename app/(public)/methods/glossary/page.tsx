import type { Metadata } from 'next';
import Link from 'next/link';
import { Prose } from '@/app/_ui/math/render-markdown';
import { readGlossary } from '../method-pages';

export const metadata: Metadata = { title: 'Glossary' };

export default async function Glossary() {
  const page = await readGlossary();
  return (
    <div className="wrap pt-10">
      <p className="mb-2 flex items-center gap-2.5 text-ui text-ink-2"><Link href="/methods" className="inline-flex min-h-8 items-center">Methods</Link><span aria-hidden>/</span><span>glossary</span></p>
      <h1 className="mb-4">{page.title}</h1>
      <Prose source={page.body} firstHeading={2} />
    </div>
  );
}
