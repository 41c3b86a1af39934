'use client';
import Link from 'next/link';
import type { Route } from 'next';
import { useRouter } from 'next/navigation';
import { useCallback } from 'react';
import { useProgress } from '@/app/(desk)/compose/[id]/use-progress';
import { StopRun } from '@/app/(desk)/runs/stop-run';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { ProgressBar } from '@/app/_ui/primitives/progress';
import { Table } from '@/app/_ui/primitives/table';
import { formatAt } from '@/app/_ui/claim/setting-names';
import { samePlace, type Place } from '@/lib/kernel/place';
import { formatProblem } from '@/lib/kernel/problem';
import type { VariationView } from '@/lib/services/variations/variation-view';
import { isUnderWay } from '@/lib/services/runs/under-way';
import type { AskedVariation } from './asked-variation';
import { VariationForm } from './variation-form';
import type { VariationSource } from './variation-source';
import { toleranceInUnit, VariedNumber } from './varied-number';
import { changesInWords, SEEN_BY } from './variation-words';

interface PanelProps {
  readonly source: VariationSource;
  readonly own: readonly VariationView[];
  readonly left: number;
  readonly asked: AskedVariation | null;
}

const isLive = ({ run }: VariationView): boolean => isUnderWay(run);

type Now = ReturnType<typeof useProgress>;

/** Any setting, the band, the modes, the curve: rerun one claim with others, beside the official number and never in its place. */
export function VariationPanel({ source, own, left, asked }: PanelProps) {
  const router = useRouter();
  const look = useCallback(() => router.refresh(), [router]);
  const now = useProgress(source.submissionId, own.some(isLive), look);
  return (
    <Disclosure summary="Vary it" open={own.length > 0 || asked !== null}>
      <div className="grid grid-cols-1 gap-4 rounded border border-dashed border-control px-4 py-3">
        <p className="text-ui text-ink-2">{source.isDraft ? `A variation of ${source.claimId} in a draft is seen by you alone. The checked number never changes.` : `A variation of ${source.claimId} is seen by you alone until you attach it to a comment or, on a record, open it by its link. The official number never changes.`} {left} left today.</p>
        {left > 0 ? <VariationForm source={source} asked={asked} /> : <p className="text-ui">Those of today are used up: each counts for 24 hours. Yours below stay, and so do their addresses.</p>}
        {own.length > 0 && <Saved source={source} own={own} now={now} />}
      </div>
    </Disclosure>
  );
}

function Saved({ source, own, now }: { readonly source: VariationSource; readonly own: readonly VariationView[]; readonly now: Now }) {
  const [only] = source.points;
  return (
    <Table caption={`Your variations of ${source.claimId}`}>
      <thead><tr><th scope="col">Changed</th><th scope="col">Result</th><th scope="col">Seen by</th></tr></thead>
      <tbody>
        {source.points.length === 1 && only && <tr><th scope="row" className="font-normal!">nothing: the {source.isDraft ? 'checked' : 'official'} number</th><td><VariedNumber value={only.value} u={only.expandedUncertainty} unit={source.unit} against={againstAt(source, only.at, null)} /></td><td /></tr>}
        {own.map((v) => (
          <tr key={v.id}>
            <th scope="row" className="font-normal!">
              <Link href={`/variations/${v.id}` as Route} className="inline-flex min-h-8 items-center">{changesInWords(v.changes)}</Link>
              {v.note && <span className="block max-w-[40ch] text-small text-ink-2 [overflow-wrap:anywhere]">{v.note}</span>}
            </th>
            <td><Outcome variation={v} source={source} now={now} /></td>
            <td>{SEEN_BY[v.visibility]}{v.revision !== source.revision && <span className="block text-small text-ink-2">of revision {v.revision}</span>}</td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

/** Read against the official number of the same place; where a sweep has one value, against the first. */
function againstAt({ points, quantity }: VariationSource, at: Place, value: number | null) {
  const official = points.find((p) => samePlace(p.at, at)) ?? points[0];
  const there = official !== undefined && samePlace(official.at, at) ? official.value : null;
  return { tolerance: toleranceInUnit(official?.tolerance ?? null, quantity.scale, value ?? there), apart: value !== null && there !== null ? value - there : null };
}

function Outcome({ variation, source, now }: { readonly variation: VariationView; readonly source: VariationSource; readonly now: Now }) {
  const { run } = variation;
  switch (run.state) {
    case 'queued':
    case 'running': {
      const told = now?.runId === run.id ? now : run;
      const words = told.doing || (run.state === 'queued' ? 'waiting for a worker' : 'under way');
      return <><span>{words}</span><ProgressBar label={`Variation: ${changesInWords(variation.changes)}`} fraction={told.fraction} /><StopRun id={source.submissionId} runId={run.id} what="variation" /></>;
    }
    case 'stopped': return run.because;
    case 'refused': return run.problems.map(formatProblem).join(' ');
    case 'measured': {
      const claim = run.result.claims.find((c) => c.id === variation.claimId);
      const stops = claim?.findings.filter((f) => f.level === 'stops-lodging').map((f) => f.text).join(' ');
      return (claim?.points ?? []).slice(0, 6).map((p, i) => <p key={i}>{Object.keys(p.at).length > 0 && `${formatAt(p.at)}: `}<VariedNumber value={p.value} u={p.expandedUncertainty} unit={source.unit} against={againstAt(source, p.at, p.value)} />{p.value === null && stops && `: ${stops}`}</p>);
    }
  }
}
