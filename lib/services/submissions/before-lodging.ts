import type { AuthorView, DraftSheet, FileView, RunView } from './submission-view';
import { inputsDigest } from '@/lib/services/runs/inputs-digest';

interface Draft {
  readonly title: string;
  readonly sheet: DraftSheet;
  readonly files: readonly Pick<FileView, 'name' | 'sha256'>[];
  readonly authors: readonly AuthorView[];
  readonly check: { readonly run: RunView; readonly current: boolean } | null;
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
  return [...own, ...fromCheck(draft.check)];
}

function fromCheck(check: Draft['check']): readonly string[] {
  if (check === null) return ['Nothing has been checked yet. Run a check.'];
  const { run, current } = check;
  if (run.state === 'queued' || run.state === 'running') return ['The check is still running. Wait for it to end.'];
  if (!current) return ['Files, settings or claims have changed since the last check. Check again.'];
  if (run.state === 'stopped') return [`The check stopped: ${run.because} Check again.`];
  if (run.state === 'refused') return [`The check could not read the sheet or a file: ${run.problems.length} to mend, listed with the check.`];
  if (run.state !== 'measured') return [];
  return run.result.claims.flatMap((claim) =>
    claim.findings.filter((f) => f.level === 'stops-lodging').map((f) => `${claim.id}: ${f.text}${f.fix ? ` ${f.fix}` : ''}`),
  );
}
