import Link from 'next/link';
import type { ReactNode } from 'react';
import type { ResultClaim } from '@/lib/pipeline/result';
import { ClaimPlots } from '../charts/claim-plots';
import { figuresAt, type FigurePlace } from '../charts/figure-place';
import { Formula } from '../math/formula';
import { BudgetTable } from './budget-table';
import { CandidatesPart, wasSearched } from './candidates/candidates-part';
import { OpenedRow } from './claim-open';
import { PerfCell } from './claim-table';
import { ComponentTable, hasComponents } from './component-table';
import { FileList } from './file-list';
import { FindingItem } from './finding-item';
import { MetricBoundLine } from './metric-bound';
import { PlotsOfClaim } from './plots-of-claim';
import { PointTable } from './point-table';
import { CopyRows } from './print/copy-rows';
import { LATEX_COLUMNS, latexRow, rowsOfSweep } from './print/latex-row';
import { printSourceOf } from './print/print-source';
import type { ClaimHeading, RecordSlots, RecordView } from './record-view';
import { RouteTable } from './route-table';
import { RunLog } from './run-log';
import { SensitivityTable } from './sensitivity-table';
import { SettingTable } from './setting-table';

interface OpenedClaimProps {
  readonly heading: ClaimHeading;
  readonly claim: ResultClaim;
  readonly view: RecordView;
  readonly slots: RecordSlots;
  readonly ids: readonly string[];
}

export function Part({ title, children }: { readonly title: ReactNode; readonly children: ReactNode }) {
  return (
    <div className="min-w-0">
      <h3 className="mb-1.5 text-[16px]/[24px]">{title}</h3>
      {children}
    </div>
  );
}

function AllRows({ heading, claim, view }: Pick<OpenedClaimProps, 'heading' | 'claim' | 'view'>) {
  const source = printSourceOf(view);
  return <CopyRows claimId={claim.id} columns={LATEX_COLUMNS} {...rowsOfSweep(claim.points.map((point) => latexRow({ heading, claim, point, source })))} />;
}

/** Everything behind a number: what was declared at the left, what came of it at the right, then across both. */
export function OpenedClaim({ heading, claim, view, slots, ids }: OpenedClaimProps) {
  const figures = view.figures[claim.id] ?? [];
  const plots = (place: FigurePlace) =>
    figures.length === 0 && view.figuresHref ? <PlotsOfClaim claimId={claim.id} href={view.figuresHref} place={place} /> : <ClaimPlots claimId={claim.id} figures={figuresAt(place, figures)} />;
  const files = (view.result?.files ?? []).filter((file) => !heading.files || heading.files.includes(file.name));
  return (
    <>
      <OpenedRow id={ids[0] ?? claim.id}>
        <td className="c" role="cell" colSpan={4}><div className="grid gap-6">
          {slots.action && <div>{slots.action(claim.id)}</div>}
          <Part title="Settings"><SettingTable claimId={claim.id} settings={claim.settings} readings={heading.readings} unsaid={heading.unsaid} /></Part>
          {claim.points.length > 1 && <Part title="To print"><AllRows heading={heading} claim={claim} view={view} /></Part>}
          {heading.quote && <Part title="As the text says"><p className="max-w-[52ch] border-l-2 border-control pl-3 font-serif italic">“{heading.quote}”</p></Part>}
          {heading.formula && (
            <Part title="Formula as used">
              <Formula tex={heading.formula} display label={`Formula of ${claim.id}`} />
              {heading.methodHref && <p className="text-small"><a href={heading.methodHref}>How it is computed</a></p>}
            </Part>
          )}
          {files.length > 0 && <Part title="Files"><FileList files={files} /></Part>}
        </div></td>
        <PerfCell />
        <td className="r" role="cell" colSpan={5}><div className="grid gap-6">
          {plots('beside')}
          {figures.length === 0 && !view.figuresHref && <p className="text-ui text-ink-2">No figures were kept for this run.</p>}
          {heading.points.length > claim.points.length || claim.points.length > 8 ? <Part title={`All ${claim.points.length} points`}><PointTable claim={claim} heading={heading} /></Part> : null}
        </div></td>
      </OpenedRow>
      <OpenedRow id={ids[1] ?? `${claim.id}-more`} across>
        <td role="cell" colSpan={10}>
          <div className="grid grid-cols-1 gap-x-10 gap-y-8 mid:grid-cols-2">
            <div className="grid min-w-0 content-start gap-6 empty:hidden">{plots('below')}</div>
            {claim.budget.length > 0 && <Part title="Error budget"><BudgetTable claim={claim} /><p className="text-small"><Link href="/methods/budget" className="inline-flex min-h-8 items-center">How each part is estimated</Link></p></Part>}
            {claim.metricBound && <Part title="Metric bound"><MetricBoundLine bound={claim.metricBound} unit={claim.unit} /></Part>}
            {(claim.sensitivities ?? []).length > 0 && <Part title="Sensitivities"><SensitivityTable claim={claim} /></Part>}
            {hasComponents(claim) && <Part title="Beside the number"><ComponentTable claim={claim} /></Part>}
            {wasSearched(claim) && <Part title="Would agree if"><CandidatesPart claim={claim} slots={slots} /></Part>}
            <Part title="Two routes"><RouteTable claim={claim} /></Part>
            <Part title="Findings">
              {claim.findings.length === 0 ? <p className="text-ui text-ink-2">The checks found nothing to say about these data.</p> : claim.findings.map((finding, i) => <FindingItem key={`${finding.code}${i}`} finding={finding} answer={view.answerTo(finding)} />)}
            </Part>
            <RunLog view={view} claimId={claim.id} />
          </div>
          {slots.discussion && <div className="mt-6">{slots.discussion(claim.id)}</div>}
        </td>
      </OpenedRow>
    </>
  );
}
