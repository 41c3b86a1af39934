import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { Formula } from '@/app/_ui/math/formula';
import { Prose } from '@/app/_ui/math/render-markdown';
import { VerdictChip } from '@/app/_ui/verdict/verdict-chip';
import { verdictLooks, verdictOrder } from '@/app/_ui/verdict/verdict-words';
import { listMethodPages } from './method-pages';

export const metadata: Metadata = { title: 'Methods' };

export default async function Methods() {
  const pages = await listMethodPages();
  return (
    <div className="wrap pt-10">
      <h1>Methods</h1>
      <section className="mt-6" aria-labelledby="rule-h">
        <h2 id="rule-h">How a verdict is made</h2>
        <div className="prose mt-3">
          <p>A claimed value and a recomputed one are apart by <i>d</i> = |recomputed − claimed|. The tolerance <i>T</i> is the declared one plus half a unit of the last printed digit. <i>U</i> is the expanded uncertainty (<i>k</i> = 2) of the computation alone: what its steps, transforms and the rounding of the input can move.</p>
          <Formula display label="The rule in one line" tex="\text{agrees: } d+U\le T \qquad \text{differs: } d-U>T \qquad \text{unsettled: otherwise}" />
          <p>What was chosen (taper, interpolation rule, windows) or cannot be known from the files (resolution, radius, start-up radiation, eccentricity) is listed in the budget with its size. It decides <i>coverage</i>, a second statement, and never <i>U</i>. Two routes compute every number; where they part by more than the larger of <i>T</i>/4 and <i>U</i>, there is no verdict.</p>
        </div>
        <ul className="mt-4 grid gap-x-8 text-ui stack:grid-cols-2">
          {verdictOrder.map((state) => (
            <li key={state} className="grid items-center gap-3 py-2.5 shadow-[inset_0_1px_var(--hair)] sm:grid-cols-[172px_1fr]"><span><VerdictChip state={state} /></span><span>{verdictLooks[state].meaning}</span></li>
          ))}
        </ul>
        <p className="mt-4 max-w-measure text-ui"><Link href="/#means" className="inline-flex min-h-8 items-center">What verified means here, and what it does not</Link></p>
      </section>
      <section className="mt-10" aria-labelledby="quantities-h">
        <h2 id="quantities-h">Quantities</h2>
        <p className="mt-2 max-w-measure text-ink-2">One page each: the equation, both routes, the settings and what they change, the sources, the limits. What all of them share stands under <Link href="/methods/house-conventions">house conventions</Link>, what else can be meant by the same words in the <Link href="/methods/conventions">catalogue of conventions</Link>, the built-in <Link href="/methods/noise">noise curves</Link> with their plots on a page of their own, what goes into an uncertainty under <Link href="/methods/budget">error budget</Link>, how the server looks for a reading that would close a gap under <Link href="/methods/candidates">would agree if</Link>, every message about the data under <Link href="/methods/findings">findings</Link>, every word in the <Link href="/methods/glossary">glossary</Link>.</p>
        <ul className="mt-4 grid gap-x-10 stack:grid-cols-2">
          {pages.map((page) => (
            <li key={page.id} className="py-3 shadow-[inset_0_1px_var(--hair)]">
              <Link href={`/methods/${page.id}` as Route} className="font-serif text-[17px]/[24px] font-semibold">{page.title}</Link>
              <div className="mt-1 text-ui text-ink-2 [&_.prose]:font-sans [&_.prose]:text-[14px]/[20px]"><Prose source={page.summary} /></div>
            </li>
          ))}
        </ul>
      </section>
    </div>
  );
}
