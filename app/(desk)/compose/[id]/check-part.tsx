'use client';
import { useRouter } from 'next/navigation';
import { useCallback } from 'react';
import { FindingItem } from '@/app/_ui/claim/finding-item';
import { Button } from '@/app/_ui/primitives/button';
import { ProgressList } from '@/app/_ui/primitives/progress';
import { VerdictStrip } from '@/app/_ui/verdict/verdict-chip';
import { countVerdicts } from '@/app/_ui/verdict/verdict-words';
import { Trouble } from '../../act-parts';
import { StopRun } from '../../runs/stop-run';
import { useAct } from '../../use-act';
import { check, lodge } from '../actions';
import { AnswerForm } from './answer-form';
import { AssumedSettings } from './assumed-settings';
import type { CheckSummary } from './check-summary';
import type { ComposerFields } from './fields';
import { fixesOf, type Fix } from './fixes';
import { placeOf, problemText } from './problem-place';
import type { SaveState } from './save-draft';
import { useProgress } from './use-progress';
import { isUnderWay } from '@/lib/services/runs/under-way';

interface CheckPartProps {
  readonly id: string;
  readonly check: CheckSummary | null;
  readonly beforeLodging: readonly string[];
  readonly isFirstAuthor: boolean;
  readonly save: SaveState;
  readonly saveNow: () => Promise<boolean>;
  readonly fields: () => ComposerFields;
  readonly onFix: (fix: Fix) => void;
  readonly onGo: (field: string) => void;
}

/** The server's reading before lodging: what it saw, what may be done about each thing, and what still bars the way. */
export function CheckPart(props: CheckPartProps) {
  const { id, check: latest, saveNow } = props;
  const router = useRouter();
  const look = useCallback(() => router.refresh(), [router]);
  const running = isUnderWay(latest);
  const progress = useProgress(id, running, look);
  const asked = useAct(check);
  const runCheck = async () => {
    if (await saveNow()) await asked.run({ id });
  };
  return (
    <section id="check" aria-labelledby="check-h" className="rounded border border-hair-2 bg-sheet">
      <header className="grid gap-2 border-b border-hair-2 px-4 py-3">
        <h2 id="check-h" className="text-h3">Check</h2>
        <CheckHead latest={latest} />
        {running && <ProgressList label="The check" steps={[{ label: progress?.doing || latest?.doing || 'Waiting for its turn', fraction: progress?.fraction ?? latest?.fraction ?? 0 }]} />}
        {latest && running && <StopRun key={latest.runId} id={id} runId={latest.runId} what="check" />}
        <div><Button tone={latest?.numbers?.current && latest.numbers.later === null ? 'plain' : 'main'} busy={running ? 'Checking' : asked.busy ? 'Asking' : null} onClick={() => void runCheck()}>{latest ? 'Check again' : 'Check'}</Button></div>
        <Trouble trouble={asked.trouble} />
      </header>
      {latest && !running && <Problems {...props} latest={latest} />}
      {latest && !running && <Findings {...props} latest={latest} />}
      {latest && !running && <AssumedSettings assumed={latest.assumed} fields={props.fields} onFix={props.onFix} />}
      <Lodging {...props} running={running} />
    </section>
  );
}

const refusedWords = ({ problems }: CheckSummary): string => `${problems.length} to mend before anything can be computed.`;

function CheckHead({ latest }: { readonly latest: CheckSummary | null }) {
  if (!latest) return <p className="text-ui text-ink-2">The server reads your files and computes each number, before anybody else sees them.</p>;
  if (isUnderWay(latest)) return <p className="text-ui text-ink-2" role="status">The check reads what was saved. Go on writing; it is saved when the check has ended.</p>;
  if (latest.numbers === null) return <p className={latest.state === 'stopped' ? 'text-ui text-differs' : 'text-ui'} role="status">{latest.state === 'refused' ? refusedWords(latest) : latest.because}</p>;
  return (
    <div role="status" className="grid gap-1">
      {latest.state === 'refused' && <p className="text-ui">{refusedWords(latest)}</p>}
      {latest.numbers.later && <p className="text-ui">{latest.numbers.later}</p>}
      <VerdictStrip verdicts={latest.verdicts} />
      <p className="text-ui">{countVerdicts(latest.verdicts.map((v) => v.verdict))}</p>
      {!latest.numbers.current && <p className="text-ui text-unsettled">Of an earlier save: something has changed since.</p>}
    </div>
  );
}

type WithLatest = CheckPartProps & { readonly latest: CheckSummary };

function Problems({ latest, fields, onGo }: WithLatest) {
  if (latest.problems.length === 0) return null;
  return (
    <ul aria-label="To mend" className="grid gap-0 px-4">
      {latest.problems.map((problem, i) => {
        const place = placeOf(problem.where, fields());
        return (
          <li key={i} className="edge edge-stop border-t border-hair py-3 pl-3 text-ui [overflow-wrap:anywhere] first:border-t-0">
            {place.field ? <Button tone="quiet" size="low" className="-ml-2" onClick={() => onGo(place.field ?? '')}>{place.words}</Button> : <b>{place.words}</b>}
            <p>{problemText(problem)}</p>
          </li>
        );
      })}
    </ul>
  );
}

function Findings({ id, latest, fields, onFix }: WithLatest) {
  if (latest.numbers === null) return null;
  if (latest.findings.length === 0) return <p className="px-4 py-3 text-ui text-ink-2">The checks found nothing to say about these data.</p>;
  return (
    <div role="group" aria-label="Findings" className="px-4 [&_.edge]:sm:grid-cols-1">
      {latest.findings.map(({ finding, claims, answer }) => {
        const fixes = claims.flatMap((claim) => fixesOf(finding, claim, fields()));
        const once = fixes.filter((fix, j) => fixes.findIndex((f) => f.field === fix.field && f.value === fix.value) === j);
        const asks = finding.level === 'needs-answer';
        const actions = [
          ...once.map((fix) => <Button key={fix.words} size="low" onClick={() => onFix(fix)}>{fix.words}</Button>),
          ...(asks ? [<AnswerForm key="answer" id={id} finding={finding} answer={answer} />] : []),
        ];
        return <FindingItem key={`${finding.code} ${finding.where} ${finding.text}`} finding={finding} answer={answer} actions={actions.length > 0 ? actions : undefined} />;
      })}
    </div>
  );
}

function Lodging({ id, beforeLodging, isFirstAuthor, save, running }: CheckPartProps & { readonly running: boolean }) {
  const router = useRouter();
  const lodging = useAct(lodge, () => router.push(`/submissions/${id}`));
  const own = [...(isFirstAuthor ? [] : ['The first author lodges.']), ...(save.kind === 'saved' ? [] : ['Not everything is saved yet.'])];
  const inTheWay = running ? ['The check is still running. Wait for it to end.'] : [...own, ...beforeLodging];
  return (
    <footer className="grid gap-2 border-t border-hair-2 px-4 py-3">
      <div><Button tone={inTheWay.length === 0 ? 'main' : 'plain'} aria-disabled={inTheWay.length > 0 || undefined} aria-describedby="in-the-way" busy={lodging.busy ? 'Lodging' : null} onClick={() => { if (inTheWay.length === 0) void lodging.run({ id }); }}>Lodge</Button></div>
      <div id="in-the-way" className="text-ui text-ink-2">
        {inTheWay.length === 0 ? <p>Nothing stands in the way. What is lodged stands as it is; changes go into a next revision.</p> : <ul className="grid gap-1">{inTheWay.map((sentence) => <li key={sentence}>{sentence}</li>)}</ul>}
        <p className="mt-1">What differs may be lodged; it will be seen.</p>
      </div>
      <Trouble trouble={lodging.trouble} />
    </footer>
  );
}
