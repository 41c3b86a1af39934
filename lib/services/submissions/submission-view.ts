/**
 * Services are the stairs: one verb a file, taking an actor and giving explicit views, never rows.
 * This file is what a submission looks like from outside the database. Every field is named here on
 * purpose: nothing reaches a browser because a table happened to have it.
 */
import type { CandidateAnswerView } from '@/lib/services/candidates/candidate-answers';
import type { FindingAnswer } from './finding-answers';
import type { Problem } from '@/lib/kernel/problem';
import type { FiguresByClaim, ResultDocument } from '@/lib/pipeline/result';
import type { SubmissionState } from '@/lib/policy/submission-state';

/** The sheet as the author wrote it, complete or not; `lib/claims` says what is wrong with it. */
export interface DraftSheet {
  readonly format: 'counterfoil-claim/1';
  readonly title: string;
  readonly statement: string;
  readonly waveforms: Readonly<Record<string, Readonly<Record<string, unknown>>>>;
  readonly noise: Readonly<Record<string, Readonly<Record<string, unknown>>>>;
  readonly claims: readonly Readonly<Record<string, unknown>>[];
}

export interface FileView {
  readonly id: string;
  /** The path by which the sheet calls it. */
  readonly name: string;
  readonly bytes: number;
  readonly sha256: string;
}

export interface AuthorView {
  /** For authors alone, so that they can take a co-author off. */
  readonly userId?: string;
  readonly name: string;
  readonly affiliation: string | null;
  readonly orcid?: { readonly id: string; /** ORCID vouched for it; otherwise its owner typed it. */ readonly authenticated: boolean } | null;
  readonly role: 'author' | 'co-author';
  readonly confirmed: boolean;
}

export type RunView = {
  readonly id: string;
  readonly kind: 'check' | 'official' | 'variation';
  readonly engine: string;
  /** ISO 8601, UTC. */
  readonly requestedAt: string;
} & (
  | { readonly state: 'queued' | 'running'; readonly fraction: number; readonly doing: string }
  /** Given up after three tries, or stopped by the one who asked; the sentence says what a person can do. */
  | { readonly state: 'stopped'; readonly stoppedAt: string; readonly because: string }
  /** The sheet or a file could not be read; every problem is listed. */
  | { readonly state: 'refused'; readonly finishedAt: string; readonly problems: readonly Problem[] }
  | { readonly state: 'measured'; readonly finishedAt: string; readonly result: ResultDocument; readonly resultDigest: string; readonly log: readonly { readonly atMs: number; readonly doing: string }[] }
);

export type MeasuredRun = Extract<RunView, { readonly state: 'measured' }>;

/** The latest check of a draft, and whether sheet and files are still what it checked. */
export interface CheckView {
  readonly run: RunView;
  readonly current: boolean;
  /** Which author stopped it; null where nobody did. */
  readonly stoppedBy: string | null;
  /** The check before it whose numbers stand, where the latest has none of its own. */
  readonly before: { readonly run: MeasuredRun; readonly current: boolean } | null;
}

/** One numbered edition with its own computation. */
export interface RevisionView {
  readonly id: string;
  readonly number: number;
  readonly title: string;
  readonly statement: string;
  readonly sheet: DraftSheet;
  readonly files: readonly FileView[];
  /** The authors' answers to findings of its checks. */
  readonly answers: readonly FindingAnswer[];
  /** Null while it is being written. */
  readonly lodgedAt: string | null;
  /** Save with this number; a stale one is a conflict. */
  readonly version: number;
}

/** What the one who looks may do now: buttons are drawn from this, the doors ask again. */
export interface Allowed {
  readonly edit: boolean;
  readonly check: boolean;
  readonly lodge: boolean;
  readonly withdraw: boolean;
  readonly revise: boolean;
  readonly vary: boolean;
  readonly answerCandidates: boolean;
  readonly comment: boolean;
  readonly report: boolean;
  readonly invite: boolean;
  readonly decide: boolean;
}

interface SubmissionHead {
  readonly id: string;
  readonly title: string;
  readonly state: SubmissionState;
  readonly stateWords: string;
  readonly round: number;
  readonly authors: readonly AuthorView[];
  readonly stateChangedAt: string;
  readonly may: Allowed;
  /** What the authors said to candidates of this and of earlier revisions; empty in public. */
  readonly candidateAnswers: readonly CandidateAnswerView[];
}

/** The composer's view: authors only. */
export interface DraftView extends SubmissionHead {
  readonly kind: 'draft';
  readonly revision: RevisionView;
  /** Null before any. A check of another save that came to nothing is passed over for one of what is saved now. */
  readonly check: CheckView | null;
  /** What stands in the way of lodging, as sentences; empty when *Lodge* is open. */
  readonly beforeLodging: readonly string[];
}

/** The record page in review (authors, referees, editor) and in public: the latest lodged revision unless another is asked for. */
export interface LodgedView extends SubmissionHead {
  readonly kind: 'review' | 'public';
  readonly revision: RevisionView;
  readonly revisions: readonly { readonly number: number; readonly lodgedAt: string }[];
  /** The official run of this revision: the latest with numbers, else the latest. */
  readonly run: RunView | null;
  /** A later one, of another engine, that has no numbers: under way, refused or given up. Those of `run` stand. */
  readonly laterRun: RunView | null;
}

export type SubmissionView = DraftView | LodgedView;

/** One row of the author's list. */
export interface SubmissionLine {
  readonly id: string;
  readonly title: string;
  readonly state: SubmissionState;
  readonly stateWords: string;
  readonly round: number;
  readonly revision: number;
  readonly role: 'author' | 'co-author';
  /** Verdict of each claim of the latest run, in order; empty before any. */
  readonly verdicts: readonly { readonly claim: string; readonly verdict: ResultDocument['claims'][number]['verdict'] }[];
  readonly updatedAt: string;
}

export interface FiguresView {
  readonly runId: string;
  readonly figures: FiguresByClaim;
}

/** What the event stream sends: the whole small state of one run each time, so a lost message costs nothing. */
export interface ProgressEvent {
  readonly runId: string;
  readonly kind: RunView['kind'];
  readonly state: 'queued' | 'running' | 'finished' | 'stopped';
  readonly fraction: number;
  readonly doing: string;
}
