import type { Route } from 'next';
import Link from 'next/link';
import { Formula } from '../_ui/math/formula';
import { quantities } from '@/lib/engine/quantities/registry';
import { listMethodPages } from './methods/method-pages';

/** What can be claimed today, from the engine's own table, each with its symbol and the page that says how. */
export async function WhatIsRecomputed() {
  const described = new Set((await listMethodPages()).map((page) => page.id));
  return (
    <section className="wrap pt-16" aria-labelledby="which">
      <h2 id="which">Which numbers are recomputed</h2>
      <p className="mt-2 max-w-measure text-ink-2">Each has a page with its equation, both routes, the settings it rests on and what it does not say.</p>
      <ul className="mt-4 grid gap-x-10 sm:grid-cols-2 stack:grid-cols-3">
        {[...quantities.values()].filter((quantity) => described.has(quantity.id)).map((quantity) => (
          <li key={quantity.id} className="flex min-h-12 items-center gap-3 shadow-[inset_0_1px_var(--hair)]">
            <span className="w-16 flex-none text-ink-2"><Formula tex={quantity.symbol} /></span>
            <Link href={`/methods/${quantity.id}` as Route} className="inline-flex min-h-8 items-center">{quantity.title}</Link>
          </li>
        ))}
      </ul>
    </section>
  );
}
