import type { DecisionView, RecordView, ReportView, RunView as RunOnScreen } from '@/app/_ui/claim/record-view';
import type { FiguresByClaim, ResultDocument } from '@/lib/pipeline/result';
import { formatProblem } from '@/lib/kernel/problem';
import type { DraftView, LodgedView, RunView } from '@/lib/services/submissions/submission-view';
import { answerTo } from '@/lib/services/submissions/finding-answers';
import { answeredGuesses } from './answered-guesses';
import { formatDay } from './dates';
import { figuresHref } from './figures-href';
import { laterCheckWords, laterRunWords } from './later-run';
import { logsOf } from './run-log';
import { headingsOfResult, headingsOfSheet } from './sheet-headings';

/** How a run stands, in the component's words. */
export function runAsView(run: RunView | null): RunOnScreen {
  if (!run) return { state: 'none' };
  switch (run.state) {
    case 'queued': return { state: 'waiting', ahead: null };
    case 'running': return { state: 'running', steps: [{ label: run.doing || 'Under way', fraction: run.fraction }] };
    case 'stopped': return { state: 'stopped', reason: run.because };
    case 'refused': return { state: 'stopped', reason: run.problems.map(formatProblem).join(' ') || 'The sheet or a file could not be read.' };
    case 'measured': return { state: 'done', finishedOn: formatDay(run.finishedAt), resultSha256: run.resultDigest };
  }
}

interface Extra {
  readonly figures?: FiguresByClaim;
  readonly reports?: readonly ReportView[];
  readonly cautions?: readonly string[];
  readonly decision?: DecisionView | null;
}

const measured = (run: RunView | null): ResultDocument | null => (run?.state === 'measured' ? run.result : null);

/** Of a draft, those of the check before stand where the latest has no numbers. */
const runBehind = (submission: DraftView | LodgedView): RunView | null =>
  submission.kind === 'draft' ? (submission.check?.before?.run ?? submission.check?.run ?? null) : submission.run;

const laterWords = (submission: DraftView | LodgedView): string | null =>
  submission.kind === 'draft' ? submission.check && laterCheckWords(submission.check) : laterRunWords(submission.run, submission.laterRun);

/** A draft with its latest check, or a lodged revision with its official run. */
export function submissionAsView(submission: DraftView | LodgedView, extra: Extra = {}): RecordView {
  const run = runBehind(submission);
  const result = measured(run);
  const { revision } = submission;
  const revisions = submission.kind === 'draft' ? [] : submission.revisions;
  return {
    mode: submission.kind,
    id: submission.id,
    title: revision.title || 'Untitled',
    people: submission.authors.map(({ name, affiliation, orcid }) => ({ name, affiliation, orcid: orcid?.id ?? null, orcidAuthenticated: orcid?.authenticated ?? false })),
    state: submission.stateWords,
    standing: null,
    revision: revision.number,
    revisions: revisions.map((r) => ({ label: `Revision ${r.number}`, href: `?revision=${r.number}`, current: r.number === revision.number })),
    engine: run?.engine ?? null,
    facts: [`revision ${revision.number}`, ...(revision.lodgedAt ? [`lodged ${formatDay(revision.lodgedAt)}`] : [])],
    claims: result ? headingsOfResult(result.claims, revision.sheet) : headingsOfSheet(revision.sheet),
    run: runAsView(run),
    laterRun: laterWords(submission),
    result,
    figures: extra.figures ?? {},
    figuresHref: run?.state === 'measured' ? figuresHref(submission.id, run.id) : null,
    answerTo: (finding) => answerTo(revision.answers, finding),
    guesses: answeredGuesses(result?.guesses, revision.answers),
    logs: logsOf(run, result?.claims ?? []),
    statement: revision.statement || null,
    decision: extra.decision ?? null,
    reports: extra.reports ?? [],
    cautions: extra.cautions ?? [],
    history: revisions.toReversed().map((r) => ({ on: formatDay(r.lodgedAt), text: `Lodged, revision ${r.number}` })),
  };
}
