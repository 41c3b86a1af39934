import type { AuthorView, CheckView, DraftSheet, FileView } from './submission-view';
import { inputsDigest } from '@/lib/services/runs/inputs-digest';
import { isUnderWay } from '@/lib/services/runs/under-way';
import { answerTo, type FindingAnswer } from './finding-answers';

interface Draft {
  readonly title: string;
  readonly sheet: DraftSheet;
  readonly files: readonly Pick<FileView, 'name' | 'sha256'>[];
  readonly answers: readonly FindingAnswer[];
  readonly authors: readonly AuthorView[];
  readonly check: Pick<CheckView, 'run' | 'current' | 'before'> | null;
}

export const isCurrent = (checkedDigest: string, sheet: DraftSheet, files: readonly Pick<FileView, 'name' | 'sha256'>[]): boolean =>
  checkedDigest === inputsDigest(sheet as unknown as Record<string, unknown>, files);

/** What stands between a draft and lodging, each with its next step. What differs may be lodged; it will be seen. */
export function beforeLodging(draft: Draft): readonly string[] {
  const own = [
    ...(draft.title.trim() === '' ? ['The submission has no title. Give it one.'] : []),
    ...(draft.sheet.claims.length === 0 ? ['No number is claimed yet. Add a claim.'] : []),
    ...draft.authors.filter((a) => !a.confirmed).map((a) => `${a.name} has not confirmed authorship and the release of the data. Ask them to.`),
  ];
  return [...own, ...fromCheck(draft.check, draft.answers)];
}

function fromCheck(check: Draft['check'], answers: readonly FindingAnswer[]): readonly string[] {
  if (check === null) return ['Nothing has been checked yet. Run a check.'];
  if (isUnderWay(check.run)) return ['The check is still running. Wait for it to end.'];
  // One that was stopped says nothing against numbers of the very same sheet and files.
  const { run, current } = check.run.state === 'stopped' && check.before?.current ? check.before : check;
  if (!current) return ['Files, settings or claims have changed since the last check. Check again.'];
  if (run.state === 'stopped') return ['The last check ended before there was a number of what is saved now. Check again.'];
  if (run.state === 'refused') return [`The check could not read the sheet or a file: ${run.problems.length} to mend, listed with the check.`];
  if (run.state !== 'measured') return [];
  const found = run.result.claims.flatMap((claim) => claim.findings.map((finding) => ({ claim: claim.id, ...finding })));
  const stops = found.filter((f) => f.level === 'stops-lodging').map((f) => `${f.claim}: ${f.text}${f.fix ? ` ${f.fix}` : ''}`);
  const asks = found.filter((f) => f.level === 'needs-answer' && answerTo(answers, f) === null).map((f) => `${f.claim} has a finding that needs your answer, about ${f.where}. Change the sheet as it says, or write why it stands.`);
  return [...new Set([...stops, ...asks])];
}
