import type { Metadata } from 'next';
import Link from 'next/link';
import { classes } from '@/app/_ui/primitives/classes';
import { findingAnchor, findingLevels } from '@/app/_ui/claim/finding-levels';
import { findingsCatalogue, parts, type CatalogueRow, type Part } from '@/lib/engine/findings/catalogue';
import { PageContents } from '../page-contents';
import { Trail } from '../trail';

export const metadata: Metadata = { title: 'Findings', description: 'Every finding: its level, the rule that raises it, the claims it concerns and what to do about it.' };

const order = Object.keys(parts) as Part[];
const rowsOf = (part: Part): CatalogueRow[] => findingsCatalogue.filter((row) => row.part === part);

export default function Findings() {
  return (
    <div className="wrap pt-10">
      <Trail here="findings" />
      <div className="grid gap-x-16 gap-y-6 mid:grid-cols-[minmax(0,1fr)_240px]">
        <article className="min-w-0">
          <h1>Findings</h1>
          <div className="prose mt-3">
            <p>A finding is a message about the data or the settings of a claim, with numbers and a place. It never changes a number. Those that <b>stop lodging</b> say why there is none; those that <b>need an answer</b> leave the number as it is and ask the authors, and referees read the answer; the others are <b>worth a look</b>, or a <b>note</b>.</p>
            <p>The rules are thresholds on what the files show. A finding may be right about the file and mean no harm, and a file without findings may still be wrong. V-numbers count the house’s list of validations. What the words mean stands in the <Link href="/methods/glossary">glossary</Link>.</p>
          </div>
          {order.map((part) => <FindingsOf key={part} part={part} />)}
        </article>
        <div className="max-mid:order-first"><PageContents entries={order.map((part) => ({ id: part, label: parts[part] }))} /></div>
      </div>
    </div>
  );
}

const FindingsOf = ({ part }: { readonly part: Part }) => (
  <section aria-labelledby={part} className="mt-10">
    <h2 id={part} className="scroll-mt-6">{parts[part]}</h2>
    <div className="mt-3 max-w-[60rem]">{rowsOf(part).map((row) => <Row key={row.code} row={row} />)}</div>
  </section>
);

/** The row of the address stands out, so that the eye finds what it came for. */
function Row({ row }: { readonly row: CatalogueRow }) {
  const { code, numbers, levels, concerns, rule, advice } = row;
  const strictest = findingLevels[levels[0].level];
  return (
    <section id={findingAnchor(code)} aria-label={code} className={classes('edge grid scroll-mt-6 gap-x-6 gap-y-1 border-t border-hair py-3 pl-3 text-ui first:border-t-0 target:bg-hover sm:grid-cols-[15rem_minmax(0,1fr)]', strictest.edge)}>
      <div>
        <h3 className="font-code text-code font-semibold">{code}{numbers.length > 0 && <span className="ml-2 font-normal text-ink-2">{numbers.join(', ')}</span>}</h3>
        <ul className="mt-1 text-small">{levels.map(({ level, when }) => <li key={level}><b>{findingLevels[level].word}</b>{when && <span className="text-ink-2">: {when}</span>}</li>)}</ul>
      </div>
      <div className="min-w-0 max-w-[74ch]">
        <p>{rule}</p>
        <p className="mt-1">{advice}</p>
        <p className="mt-1 text-small text-ink-2">Claims concerned: {concerns}.</p>
      </div>
    </section>
  );
}
