import type { DecisionView, RecordView, ReportView } from '@/app/_ui/claim/record-view';
import type { ResultDocument } from '@/lib/pipeline/result';
import type { RecordDocument } from '@/lib/badges/record';
import { RECOMMENDATION_WORDS, REPORT_QUESTIONS } from '@/lib/reviews/report';
import type { RecordView as PublishedRecord } from '@/lib/services/records/record-view';
import type { ReportView as HandedIn } from '@/lib/services/reviews/report-view';
import type { LodgedView } from '@/lib/services/submissions/submission-view';
import { answerTo } from '@/lib/services/submissions/finding-answers';
import { formatDay } from './dates';
import { figuresHref } from './figures-href';
import { laterRunWords } from './later-run';
import { logsOf } from './run-log';
import { headingsOfResult, noSheet } from './sheet-headings';

/** What was signed, in the shape of a result: the page shows the record's own numbers and no others. */
const resultOf = (document: RecordDocument): ResultDocument => ({
  format: 'counterfoil-result/1',
  engine: document.engine,
  title: document.title,
  files: document.files,
  claims: document.claims.map(({ covered: _covered, ...claim }) => ({ ...claim, candidates: [] })),
});

/** A report as one text: each question with its answer. */
export const reportText = (report: Pick<HandedIn, 'answers'>): string =>
  REPORT_QUESTIONS.flatMap(({ id, text }) => (report.answers[id].trim() === '' ? [] : [`**${text}**\n\n${report.answers[id]}`])).join('\n\n');

export const reportAsView = (report: HandedIn): ReportView => ({
  who: report.by,
  round: report.round,
  on: formatDay(report.when.precision === 'day' ? report.when.on : report.when.at),
  recommendation: `${RECOMMENDATION_WORDS[report.recommendation]} · confidence ${report.confidence} of 5`,
  text: reportText(report),
});

const decisionOf = ({ document, decision }: PublishedRecord): DecisionView => ({
  title: `Entered at level ${document.decision.level}`,
  by: document.decision.by,
  on: formatDay(document.decision.on),
  level: document.decision.level,
  coveredClaims: document.claims.filter((claim) => claim.covered).map((claim) => claim.id),
  remarks: document.decision.remarks,
  note: decision.publicSentence || null,
});

const historyOf = (record: PublishedRecord, lodged: LodgedView | null): RecordView['history'] => [
  ...(lodged?.revisions ?? []).toReversed().map((revision) => ({ on: formatDay(revision.lodgedAt), text: `Lodged, revision ${revision.number}` })),
  { on: formatDay(record.document.enteredAt), text: `Entered by ${record.document.decision.by}` },
  ...(record.standing === 'entered' && record.standingReason === '' ? [] : [{ on: formatDay(record.standingSince), text: record.standingReason || record.standing }]),
];

/** A published record. `lodged` adds the statement, the names in the sheet and the curves; the numbers are the signed ones. */
export function recordAsView(record: PublishedRecord, lodged: LodgedView | null): RecordView {
  const { document } = record;
  const digest = document.resultDigest;
  const personOf = (name: string, i: number) => {
    const known = lodged?.authors.find((author) => author.name === name);
    const signed = document.orcids?.find(({ position }) => position === i + 1)?.orcid;
    return { name, affiliation: known?.affiliation ?? null, orcid: signed ?? known?.orcid?.id ?? null, orcidAuthenticated: signed !== undefined || known?.orcid?.authenticated === true };
  };
  return {
    mode: 'public',
    id: record.id,
    title: document.title,
    people: document.authors.map(personOf),
    state: `Entered ${formatDay(document.enteredAt)}`,
    standing: record.standing,
    revision: document.revision,
    revisions: [],
    engine: document.engine,
    facts: [`revision ${document.revision}`, `lapses ${formatDay(document.lapsesAt)} unless rerun`],
    claims: headingsOfResult(document.claims, lodged?.revision.sheet ?? noSheet),
    run: { state: 'done', finishedOn: lodged?.run?.state === 'measured' ? formatDay(lodged.run.finishedAt) : null, resultSha256: digest },
    laterRun: laterRunWords(lodged?.run ?? null, lodged?.laterRun ?? null),
    result: resultOf(document),
    figures: {},
    figuresHref: lodged?.run ? figuresHref(record.submissionId, lodged.run.id) : null,
    answerTo: (finding) => answerTo(lodged?.revision.answers ?? [], finding),
    logs: logsOf(lodged?.run ?? null, document.claims),
    statement: lodged?.revision.statement || null,
    decision: decisionOf(record),
    reports: record.reports.map(reportAsView),
    cautions: [...document.cautions.map((caution) => caution.text), record.badge.rulesSentence],
    history: historyOf(record, lodged),
  };
}
