import Link from 'next/link';
import type { Route } from 'next';
import type { ReactNode } from 'react';
import { OrcidLine } from './orcid-line';
import type { RecordPerson, RecordView } from './record-view';

const Person = ({ person }: { readonly person: RecordPerson }) => (
  <span>
    {person.name}
    {person.orcid && <> <OrcidLine orcid={person.orcid} authenticated={person.orcidAuthenticated === true} /></>}
  </span>
);

const affiliations = (people: readonly RecordPerson[]) => [...new Set(people.flatMap((p) => (p.affiliation ? [p.affiliation] : [])))];

interface RecordHeaderProps {
  readonly view: RecordView;
  /** Where this page lies: `Register / Record …`. */
  readonly trail: { readonly href: string; readonly label: string };
  readonly actions?: ReactNode;
}

export function RecordHeader({ view, trail, actions }: RecordHeaderProps) {
  return (
    <div className="grid items-start gap-x-10 gap-y-4 pt-10 pb-6 stack:grid-cols-[minmax(0,1fr)_auto]">
      <div className="min-w-0">
        <p className="mb-2 flex flex-wrap items-center gap-x-2.5 gap-y-1 text-ui text-ink-2">
          <Link href={trail.href as Route} className="inline-flex min-h-8 items-center">{trail.label}</Link>
          <span aria-hidden>/</span>
          <span className="[overflow-wrap:anywhere]">{view.mode === 'public' ? 'Record' : 'Submission'} {view.id}</span>
        </p>
        <h1>{view.title}</h1>
        <p className="mt-2 flex flex-wrap gap-x-4 gap-y-1">
          {view.people.map((person, i) => <Person key={i} person={person} />)}
          {affiliations(view.people).length > 0 && <span className="text-ink-2">{affiliations(view.people).join(', ')}</span>}
        </p>
        <p className="mt-2 flex flex-wrap items-center gap-x-2.5 gap-y-1 text-ui text-ink-2">
          {[view.state, ...view.facts].map((fact, i, all) => <span key={fact} className="flex gap-2.5">{fact}{i < all.length - 1 && <span aria-hidden>·</span>}</span>)}
        </p>
        {view.revisions.length > 1 && (
          <nav aria-label="Revisions" className="mt-2 flex flex-wrap gap-x-3 text-ui">
            {view.revisions.map((revision) => <Link key={revision.href} href={revision.href as Route} aria-current={revision.current ? 'page' : undefined} className="inline-flex min-h-8 items-center aria-[current]:font-semibold aria-[current]:text-ink aria-[current]:no-underline">{revision.label}</Link>)}
          </nav>
        )}
      </div>
      {actions && <div className="flex flex-wrap gap-2 stack:justify-end">{actions}</div>}
    </div>
  );
}
