import { allFinite } from '@/lib/kernel/finite';
import { err, ok, type Result } from '@/lib/kernel/result';
import type { ResultClaim, ResultDocument, ResultPoint } from '@/lib/pipeline/result';

/** What an editor can decide, and when a level is open. The machine computes; only the editor enters. */
export const DECISION_KINDS = ['back-with-author', 'set-aside', 'enter'] as const;
export type DecisionKind = (typeof DECISION_KINDS)[number];

export const DECISION_WORDS: Readonly<Record<DecisionKind, string>> = {
  'back-with-author': 'Back with author',
  'set-aside': 'Set aside',
  enter: 'Enter in the register',
};

export const LEVELS = [1, 2, 3] as const;
export type Level = (typeof LEVELS)[number];

export const LEVEL_WORDS: Readonly<Record<Level, string>> = { 1: 'Number', 2: 'Number and uncertainty', 3: 'Number, uncertainty and scope' };

export const DECISION_REMARKS = ['corrected during review', 'digits reduced', 'scope narrowed', 'second data set'] as const;
export type DecisionRemark = (typeof DECISION_REMARKS)[number];

/** Why a level is not open: one sentence for the editor, one code for the door. */
export interface LevelRefusal {
  readonly code: 'reviews/no-run' | 'reviews/no-agreeing-claim' | 'reviews/too-few-reports' | 'reviews/not-covered' | 'reviews/scope-not-examined';
  readonly text: string;
}

export interface LevelFacts {
  readonly result: ResultDocument | null;
  /** Referees who handed in a report that counts, over all rounds; each counts once. */
  readonly reports: number;
}

const pointByTwoRoutes = (point: ResultPoint): boolean => {
  const { A, B } = point.routes;
  if (!allFinite(A, B, point.value, point.expandedUncertainty)) return false;
  const apart = Math.abs((A as number) - (B as number));
  return apart <= Math.max((point.tolerance ?? 0) / 4, point.expandedUncertainty as number);
};

/**
 * Agreement by two routes, asked again from the numbers and not from the word alone: every point
 * agrees, and at every point where route B ran (at least one) the routes meet.
 */
export function agreesByTwoRoutes(claim: ResultClaim): boolean {
  if (claim.verdict !== 'agrees' || claim.points.length === 0 || claim.routeB.length === 0) return false;
  if (claim.points.some((p) => p.verdict !== 'agrees')) return false;
  return claim.routeB.every((i) => {
    const point = claim.points[i];
    return point !== undefined && pointByTwoRoutes(point);
  });
}

/** The claims a level covers. One that stands as printed and differs is covered by none. */
export function coveredClaims(result: ResultDocument, level: Level): string[] {
  const agreeing = result.claims.filter(agreesByTwoRoutes);
  const covered = level === 1 ? agreeing : agreeing.filter((c) => c.coverage.state === 'covered');
  return covered.map((c) => c.id);
}

const REPORTS_WANTED: Readonly<Record<Level, number>> = { 1: 1, 2: 2, 3: 2 };

function whyNotOpen(level: Level, facts: LevelFacts): LevelRefusal[] {
  const { result } = facts;
  if (!result) return [{ code: 'reviews/no-run', text: 'There is no finished run of this revision.' }];
  const refusals: LevelRefusal[] = [];
  if (coveredClaims(result, 1).length === 0) refusals.push({ code: 'reviews/no-agreeing-claim', text: 'No claim agrees by two routes.' });
  else if (level > 1 && coveredClaims(result, 2).length === 0)
    refusals.push({ code: 'reviews/not-covered', text: 'No agreeing claim has a stated uncertainty that covers what the data allow.' });
  const wanted = REPORTS_WANTED[level];
  if (facts.reports < wanted) refusals.push({ code: 'reviews/too-few-reports', text: `Level ${level} asks for ${wanted === 1 ? 'one report' : 'reports of two referees'}; ${facts.reports} handed in.` });
  // The server runs no scan of the declared domain yet, so nothing can support the third level.
  if (level === 3) refusals.push({ code: 'reviews/scope-not-examined', text: 'No scan of the declared domain and of the varied settings has been run.' });
  return refusals;
}

/** The claims that a level would cover, or every reason why it is not open. */
export function openLevel(level: Level, facts: LevelFacts): Result<readonly string[], readonly LevelRefusal[]> {
  const refusals = whyNotOpen(level, facts);
  return refusals.length > 0 || !facts.result ? err(refusals) : ok(coveredClaims(facts.result, level));
}

/** The editor signs by typing the first three words of the title (all of a shorter one). */
export const signingWords = (title: string): string => title.trim().split(/\s+/).slice(0, 3).join(' ');

const plain = (text: string): string => text.trim().replace(/\s+/g, ' ').toLocaleLowerCase('en-GB');
export const isSigned = (title: string, typed: string): boolean => plain(typed) !== '' && plain(typed) === plain(signingWords(title));
