import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { Prose } from '@/app/_ui/math/render-markdown';
import { findMethodPage } from '../method-pages';

interface MethodProps {
  readonly params: Promise<{ readonly quantity: string }>;
}

export async function generateMetadata({ params }: MethodProps): Promise<Metadata> {
  const page = await findMethodPage((await params).quantity);
  return { title: page ? `${page.title}, how it is computed` : 'Nothing here' };
}

export default async function MethodOfQuantity({ params }: MethodProps) {
  const page = await findMethodPage((await params).quantity);
  if (!page) notFound();
  return (
    <div className="wrap pt-10">
      <p className="mb-2 flex items-center gap-2.5 text-ui text-ink-2"><Link href="/methods" className="inline-flex min-h-8 items-center">Methods</Link><span aria-hidden>/</span><span>{page.id}</span></p>
      <h1 className="mb-4">{page.title}</h1>
      <Prose source={page.body} firstHeading={2} />
    </div>
  );
}
