import type { ConventionNote } from '@/app/_ui/claim/convention-words';
import { laterCheckWords } from '@/app/views/later-run';
import { notesBeside } from '@/app/views/setting-readings';
import type { Finding } from '@/lib/engine/contract/finding';
import { settingText } from './claim-fields';
import type { Problem } from '@/lib/kernel/problem';
import type { SheetGuess } from '@/lib/pipeline/guesses/sheet-guess';
import type { VerdictWord } from '@/lib/pipeline/result';
import { answerTo, type FindingAnswer } from '@/lib/services/submissions/finding-answers';
import type { DraftView } from '@/lib/services/submissions/submission-view';
import { isUnderWay } from '@/lib/services/runs/under-way';

export interface FoundFinding {
  readonly finding: Finding;
  /** Claims that share it. */
  readonly claims: readonly string[];
  /** What the authors answered to it, if anything. */
  readonly answer: string | null;
}

export interface AssumedSetting {
  readonly claim: string;
  readonly name: string;
  /** In the words of the form, ready to be declared. */
  readonly value: string;
  readonly unit: string;
  /** What else can be meant by it. */
  readonly notes: readonly ConventionNote[];
}

/** The latest check as the panel shows it, with what was found where there are numbers; these themselves are drawn on the server. */
export interface CheckSummary {
  readonly runId: string;
  readonly state: 'queued' | 'running' | 'stopped' | 'refused' | 'measured';
  readonly current: boolean;
  /** Of the check whose numbers stand; null where there is none. */
  readonly numbers: { readonly current: boolean; /** A later check has none, in a sentence. */ readonly later: string | null } | null;
  readonly fraction: number;
  readonly doing: string;
  readonly because: string | null;
  readonly problems: readonly Problem[];
  readonly findings: readonly FoundFinding[];
  readonly verdicts: readonly { readonly id: string; readonly verdict: VerdictWord }[];
  readonly assumed: readonly AssumedSetting[];
  /** What it saw in files that this browser does not have. */
  readonly guesses: readonly SheetGuess[];
}

const order = ['stops-lodging', 'needs-answer', 'worth-a-look', 'note'];

export function checkSummary(check: DraftView['check'], answers: readonly FindingAnswer[]): CheckSummary | null {
  if (!check) return null;
  const { run, current } = check;
  const standing = check.before ?? check;
  const result = standing.run.state === 'measured' ? standing.run.result : null;
  const claims = result?.claims ?? [];
  return {
    runId: run.id,
    state: run.state,
    current,
    numbers: result && { current: standing.current, later: laterCheckWords(check) },
    fraction: isUnderWay(run) ? run.fraction : 1,
    doing: isUnderWay(run) ? run.doing : '',
    because: run.state === 'stopped' ? run.because : null,
    problems: run.state === 'refused' ? run.problems : [],
    findings: grouped(claims.flatMap((c) => c.findings.map((finding) => ({ finding, claim: c.id })))).map((found) => ({ ...found, answer: answerTo(answers, found.finding) })),
    guesses: result?.guesses ?? [],
    verdicts: claims.map(({ id, verdict }) => ({ id, verdict })),
    assumed: claims.flatMap((c) => c.settings.filter((s) => s.standing === 'assumed' && s.value !== null).map((s) => ({ claim: c.id, name: s.name, value: settingText(s.value), unit: s.unit ?? '', notes: notesBeside(c.quantity, s.name) }))),
  };
}

/** A finding about a file is told once, however many claims use the file. */
function grouped(all: readonly { readonly finding: Finding; readonly claim: string }[]): readonly Omit<FoundFinding, 'answer'>[] {
  const byText = new Map<string, { finding: Finding; claims: string[] }>();
  for (const { finding, claim } of all) {
    const key = JSON.stringify(finding);
    const seen = byText.get(key);
    if (seen) seen.claims.push(claim);
    else byText.set(key, { finding, claims: [claim] });
  }
  return [...byText.values()].sort((a, b) => order.indexOf(a.finding.level) - order.indexOf(b.finding.level));
}
