import type { FigureOrigin } from '../charts/export/figure-words';
import { LinkedPlots } from '../charts/linked-plots';
import { CoverageCell } from '../verdict/coverage-cell';
import { ClaimOpener, ClaimOpenState } from './claim-open';
import { OpenedClaim } from './opened-claim';
import { PointCells, type PointOnScreen } from './point-row';
import { placeOf } from './claim-heading';
import { CopyNumber } from './print/copy-number';
import { latexRow, latexTable } from './print/latex-row';
import { printSourceOf, sourceWords } from './print/print-source';
import { printedSentence } from './print/printed-sentence';
import type { ClaimHeading, RecordSlots, RecordView } from './record-view';
import type { ResultClaim } from '@/lib/pipeline/result';
import { visiblePoints } from './visible-points';

interface ClaimRowsProps {
  readonly heading: ClaimHeading;
  readonly view: RecordView;
  readonly slots: RecordSlots;
  /** Ids of the claims that stand open at first. */
  readonly initiallyOpen: readonly string[];
  readonly closed?: boolean;
}

const waitingWord = (view: RecordView, claimId: string): string | null => {
  const run = view.run;
  if (run.state === 'running') return run.claims?.[claimId] ?? 'Under way';
  if (run.state === 'waiting') return run.ahead ? `Waiting, ${run.ahead} ahead` : 'Waiting';
  if (run.state === 'stopped') return 'Run stopped';
  return run.state === 'none' ? 'Not run yet' : null;
};

function pointsOf(heading: ClaimHeading, claim: ResultClaim | undefined): readonly PointOnScreen[] {
  const shown = visiblePoints(heading.points.length, claim?.points ?? null);
  return shown.flatMap((index) => {
    const claimed = heading.points[index];
    return claimed ? [{ index, claimed, result: claim?.points[index] ?? null, place: placeOf(claim, claimed.at) }] : [];
  });
}

function ClaimName({ heading, context, openable, controls, more }: { readonly heading: ClaimHeading; readonly context: string | null; readonly openable: boolean; readonly controls: string; readonly more: number }) {
  const name = <><span className="cid">{heading.id}</span>{heading.title}</>;
  return (
    <>
      {openable ? <ClaimOpener controls={controls}>{name}</ClaimOpener> : <span className="font-semibold">{name}</span>}
      {context && <span className="with">{context}</span>}
      {more > 0 && <span className="with">{more} more {more === 1 ? 'point' : 'points'} inside</span>}
    </>
  );
}

/** The number as a sentence and as a row, ready to be copied beside it; a summary has no such buttons. */
function copyOf(heading: ClaimHeading, claim: ResultClaim | undefined, point: PointOnScreen, view: RecordView) {
  if (!claim || !point.result) return null;
  const printable = { heading, claim, point: point.result, source: printSourceOf(view) };
  return <CopyNumber about={point.place ? `${heading.id} at ${point.place}` : heading.id} sentence={printedSentence(printable)} row={latexTable([latexRow(printable)])} />;
}

/** What a saved picture says of where it comes from. */
function figureOriginOf(heading: ClaimHeading, claim: ResultClaim | undefined, view: RecordView): FigureOrigin {
  return { source: sourceWords(printSourceOf(view)), stem: `counterfoil-${view.id}-r${view.revision}`, claimId: heading.id, quantity: heading.title, place: placeOf(claim, {}) };
}

/** One claim: a tbody with a row for each point and, when opened, everything behind the number. */
export function ClaimRows({ heading, view, slots, initiallyOpen, closed }: ClaimRowsProps) {
  const claim = view.result?.claims.find((c) => c.id === heading.id);
  const points = pointsOf(heading, claim);
  const single = points.length === 1 && Object.keys(points[0]?.claimed.at ?? {}).length === 0;
  const openable = Boolean(claim) && !closed;
  const ids = [`${heading.id}-left`, `${heading.id}-more`];
  const name = <ClaimName heading={heading} context={heading.context} openable={openable} controls={ids.join(' ')} more={heading.points.length - points.length} />;
  const rows = points.map((point, i) => (
    <tr key={point.index} id={i === 0 ? heading.id : undefined} role="row" className={single ? undefined : i === 0 ? 'pt first' : 'pt'}>
      {i === 0 && <th className="c" role="rowheader" scope={single ? 'row' : 'rowgroup'} rowSpan={single ? undefined : points.length}>{name}</th>}
      <PointCells heading={heading} claim={claim ?? null} point={point} sweep={!single} first={i === 0} waiting={claim ? null : waitingWord(view, heading.id)} slots={slots} copy={closed ? null : copyOf(heading, claim, point, view)} />
      {i === 0 && <CoverageCell coverage={claim?.coverage ?? null} rowSpan={single ? undefined : points.length} />}
    </tr>
  ));
  return (
    <ClaimOpenState claimId={heading.id} initially={initiallyOpen}>
      <LinkedPlots origin={figureOriginOf(heading, claim, view)}>
        <tbody className="claim" role="rowgroup">
          {rows}
          {openable && claim && <OpenedClaim heading={heading} claim={claim} view={view} slots={slots} ids={ids} />}
        </tbody>
      </LinkedPlots>
    </ClaimOpenState>
  );
}
