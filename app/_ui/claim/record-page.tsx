import { Prose } from '../math/render-markdown';
import { Card } from '../primitives/card';
import { Facts } from '../primitives/facts';
import { Notice } from '../primitives/notice';
import { ClaimTable, ClaimTableLegend } from './claim-table';
import { FileList } from './file-list';
import { GuessTable } from './guess-table';
import { ReadingAndDecision } from './reading-and-decision';
import { RecordHeader } from './record-header';
import type { RecordSlots, RecordView, ReportView } from './record-view';

interface RecordPageProps {
  readonly view: RecordView;
  readonly slots?: RecordSlots;
  readonly trail: { readonly href: string; readonly label: string };
  readonly open?: readonly string[];
}

const standingNotes: Record<string, string> = {
  struck: 'This record has been struck. It stays readable as it was entered; it no longer vouches for its numbers.',
  'under-recheck': 'This record is being rechecked. Until a decision is made, the numbers as entered stand.',
  superseded: 'A newer record supersedes this one.',
  lapsed: 'This record has lapsed: it has not been re-verified for 24 months.',
};

function Report({ report }: { readonly report: ReportView }) {
  return (
    <article className="border-t border-hair-2 py-3.5">
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <h3>{report.who}</h3>
        <span className="text-ui text-ink-2">round {report.round}{report.on && `, ${report.on}`}</span>
        <span className="ml-auto text-ui">{report.recommendation}</span>
      </div>
      <div className="mt-1.5"><Prose source={report.text} /></div>
    </article>
  );
}

function Below({ view, slots }: { readonly view: RecordView; readonly slots: RecordSlots }) {
  return (
    <div className="mt-10 grid gap-10 mid:grid-cols-[minmax(0,1fr)_380px]">
      <div className="grid min-w-0 content-start gap-10">
        {view.statement && <section aria-labelledby="statement-h"><h2 id="statement-h" className="mb-3">Statement</h2><Prose source={view.statement} /></section>}
        {view.reports.length > 0 && <section aria-labelledby="reports-h"><h2 id="reports-h" className="mb-3">Reports</h2>{view.reports.map((report, i) => <Report key={i} report={report} />)}</section>}
      </div>
      <aside aria-label="Proofs and limits" className="grid min-w-0 content-start gap-4">
        {slots.aside}
        {view.cautions.length > 0 && (
          <Card title="What this does not say">
            <ul className="grid gap-2 text-ui">{view.cautions.map((caution) => <li key={caution}>{caution}</li>)}</ul>
          </Card>
        )}
        {view.result && view.result.files.length > 0 && <Card title="Files"><FileList files={view.result.files} /></Card>}
        {view.history.length > 0 && <Card title="History"><Facts facts={view.history.map((step) => [step.on, step.text] as const)} /></Card>}
      </aside>
    </div>
  );
}

/** One component for the draft, the referee's and the public view of a submission. */
export function RecordPage({ view, slots = {}, trail, open }: RecordPageProps) {
  const standing = view.standing ? standingNotes[view.standing] : undefined;
  return (
    <div className="wrap">
      <RecordHeader view={view} trail={trail} actions={slots.actions} />
      {standing && <div className="mb-4"><Notice kind={view.standing === 'struck' ? 'stop' : 'look'} word={view.standing === 'struck' ? 'Struck' : 'Standing'}>{standing}</Notice></div>}
      <ReadingAndDecision view={view} />
      <section className="mt-6" aria-labelledby="claims-h">
        <h2 id="claims-h" className="sr-only">Claimed and recomputed</h2>
        <ClaimTable view={view} slots={slots} open={open} />
        <ClaimTableLegend />
      </section>
      {view.guesses && view.guesses.length > 0 && <div className="mt-10"><GuessTable guesses={view.guesses} /></div>}
      <Below view={view} slots={slots} />
    </div>
  );
}
