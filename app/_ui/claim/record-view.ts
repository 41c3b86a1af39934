/**
 * What the record component is given, in each of its three uses (draft, review, public). Pages fill
 * it from their services; the component itself asks nobody. It is plain data, so it can also cross
 * from a server to a client component; what is alive (threads, buttons) comes through the slots.
 */
import type { Finding } from '@/lib/engine/contract/finding';
import type { ExtraNumber } from '@/lib/explain/candidate';
import type { ReactNode } from 'react';
import type { FiguresByClaim, ResultDocument, VerdictWord } from '@/lib/pipeline/result';
import type { ProgressStep } from '../primitives/progress';
import type { ConventionNote, SettingReadings } from './convention-words';
import type { AnsweredGuess } from './guess-words';
import type { Place } from '@/lib/kernel/place';

export type RecordMode = 'draft' | 'review' | 'public';

export interface RecordPerson {
  readonly name: string;
  readonly affiliation?: string | null;
  readonly orcid?: string | null;
  /** Authenticated iDs are shown with the sign, typed-in ones are marked as such. */
  readonly orcidAuthenticated?: boolean;
}

/** A claimed value as the sheet has it, before any run. */
export interface ClaimedPoint {
  readonly at: Place;
  /** As the author printed it, e.g. `0.9984(3)`; bounds as `> 0.999`. */
  readonly printed: string;
  readonly tolerance: number | null;
}

/** A name of the sheet and the files that stand behind it. */
export interface WaveformSource {
  readonly name: string;
  readonly files: readonly string[];
}
export type NoiseSource =
  | { readonly kind: 'built-in'; readonly id: string; readonly title: string; readonly source: string; readonly fHighHz: number }
  | { readonly kind: 'file'; readonly name: string; readonly file: string };

/** What sheet and quantity table say about a claim: enough to draw its row before a run. */
export interface ClaimHeading {
  readonly id: string;
  readonly quantity: string;
  /** E.g. `Match of A and B`. */
  readonly title: string;
  /** A line beneath: noise curve, band, what is unusual. */
  readonly context: string | null;
  readonly unit: string;
  /** `ln`: differences and tolerances are fractions, not values. */
  readonly scale: 'absolute' | 'ln';
  /** KaTeX source of the formula as used. */
  readonly formula: string | null;
  readonly methodHref: string | null;
  /** The sentence of the statement that carries the claim. */
  readonly quote?: string | null;
  readonly points: readonly ClaimedPoint[];
  /** Names of the files this claim uses; all files of the sheet when absent. */
  readonly files?: readonly string[];
  /** Absent where the sheet is out of reach. */
  readonly waveforms?: readonly WaveformSource[];
  /** Null where the quantity needs none; absent where the sheet is out of reach. */
  readonly noiseSource?: NoiseSource | null;
  /** What else can be meant by the settings in use; absent before a run. */
  readonly readings?: readonly SettingReadings[];
  /** Conventions that move this quantity and that no setting says. */
  readonly unsaid?: readonly Pick<ConventionNote, 'id' | 'title'>[];
}

export type RunView =
  | { readonly state: 'none' }
  | { readonly state: 'waiting'; readonly ahead: number | null }
  /** `claims`: what each claim's row says meanwhile, e.g. `Route B, 64 %`. */
  | { readonly state: 'running'; readonly steps: readonly ProgressStep[]; readonly claims?: Readonly<Record<string, string>> }
  | { readonly state: 'stopped'; readonly reason: string }
  | { readonly state: 'done'; readonly finishedOn: string | null; readonly resultSha256: string | null };

export interface RevisionLink {
  readonly label: string;
  readonly href: string;
  readonly current: boolean;
}

export interface DecisionView {
  /** E.g. `Entered at level 1`. */
  readonly title: string;
  readonly by: string;
  /** Day, `YYYY-MM-DD`. */
  readonly on: string;
  readonly level: 1 | 2 | 3 | null;
  readonly coveredClaims: readonly string[];
  readonly remarks: readonly string[];
  readonly note: string | null;
}

export interface ReportView {
  readonly who: string;
  readonly round: number;
  readonly on: string | null;
  readonly recommendation: string;
  readonly text: string;
}

export interface RecordView {
  readonly mode: RecordMode;
  readonly id: string;
  readonly title: string;
  readonly people: readonly RecordPerson[];
  /** The state in words, e.g. `In review, round 1`; `Entered`, `Struck`. */
  readonly state: string;
  readonly standing?: 'entered' | 'under-recheck' | 'superseded' | 'struck' | 'lapsed' | null;
  readonly revision: number;
  readonly revisions: readonly RevisionLink[];
  readonly engine: string | null;
  /** Short facts of the header: `Entered 14 Nov 2026`, `after round 2`, licence. */
  readonly facts: readonly string[];
  readonly claims: readonly ClaimHeading[];
  readonly run: RunView;
  /** A later run that has no numbers, in full sentences: those shown stand. */
  readonly laterRun?: string | null;
  readonly result: ResultDocument | null;
  /** Curves that come with the page; without them `figuresHref` is asked when a claim is opened. */
  readonly figures: FiguresByClaim;
  /** Address that answers `{ figures: FiguresByClaim }`. */
  readonly figuresHref?: string | null;
  /** Whole address at which a record is published. */
  readonly address?: string | null;
  /** What the authors answered to a finding. */
  readonly answerTo: (finding: Finding) => string | null;
  /** What the files say of their declaration; absent where that is not told. */
  readonly guesses?: readonly AnsweredGuess[];
  /** Run log by claim id; `''` for the whole run. */
  readonly logs: Readonly<Record<string, string>>;
  /** Markdown with maths. */
  readonly statement: string | null;
  readonly decision: DecisionView | null;
  readonly reports: readonly ReportView[];
  /** What this does not say, in full sentences. */
  readonly cautions: readonly string[];
  readonly history: readonly { readonly on: string; readonly text: string }[];
}

/** Where desk pages plug in. Called while the page is drawn on the server; each gives a node or nothing. */
export interface RecordSlots {
  /** Beside the recomputed number: its anchor, with the count of threads. `point` is the index in the claim. */
  readonly anchor?: (claimId: string, point: number) => ReactNode;
  /** Under the heading of an opened claim: try a variation, comment. */
  readonly action?: (claimId: string) => ReactNode;
  /** Under the verdict of a point: `This number changed: 23.71 → 23.69`. */
  readonly change?: (claimId: string, point: number) => ReactNode;
  /** Under a candidate: the authors' answer, a try as a variation. */
  readonly candidate?: (claimId: string, candidate: ResultDocument['claims'][number]['candidates'][number]) => ReactNode;
  /** Under the number that would tell candidates apart: ask the authors for it. */
  readonly extraNumber?: (claimId: string, extra: ExtraNumber) => ReactNode;
  /** At the end of an opened claim: its threads. */
  readonly discussion?: (claimId: string) => ReactNode;
  /** Buttons of the page's head: cite, download, lodge, decide. */
  readonly actions?: ReactNode;
  /** The aside's own first cards: badge, verify panel. */
  readonly aside?: ReactNode;
}

export const verdictsOf = (view: RecordView): readonly { readonly id: string; readonly verdict: VerdictWord | 'waiting' }[] =>
  view.claims.map(({ id }) => ({ id, verdict: view.result?.claims.find((claim) => claim.id === id)?.verdict ?? 'waiting' }));
