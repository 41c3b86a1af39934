import type { BudgetLine, Figure, MeasuredPoint, UsedSetting } from '@/lib/engine/contract/measurement';
import type { Claimed } from '@/lib/claims/claimed';
import type { Finding } from '@/lib/engine/contract/finding';
import type { MetricBound } from '@/lib/engine/contract/metric-bound';
import type { Sensitivity } from '@/lib/engine/contract/sensitivity';
import type { Candidate, SearchOfClaim } from '@/lib/explain/candidate';
import type { Total } from '@/lib/engine/budget/total';
import type { Coverage } from '@/lib/verdicts/coverage';
import type { VerdictWord } from '@/lib/verdicts/verdict';
import type { SheetGuess } from './guesses/sheet-guess';

/** `counterfoil-result/1`: what one run says about one sheet. Field names are the open contract. */
export type { Claimed, Coverage, VerdictWord };

export interface ResultPoint extends Omit<MeasuredPoint, 'remarks'> {
  readonly claimed: number | { readonly above: number } | { readonly below: number };
  /** As the author printed it, e.g. `0.9984(3)`. */
  readonly printed: string;
  /** T: declared (or natural) tolerance plus half a unit of the last printed digit; null for a bound. */
  readonly tolerance: number | null;
  /** recomputed − claimed (or its ln on that scale). */
  readonly apart: number | null;
  readonly verdict: VerdictWord;
  /** Why this point alone has no number, where the others of its sweep have one. */
  readonly because?: string;
}

/** Both totals of a budget, at the worst point; where components are missing, what is told bounds the whole from below. */
export interface ResultUncertainty {
  /** Makes U and the verdict. */
  readonly computation: Total;
  /** All lines together: decides coverage. */
  readonly data: Total;
}

export interface ResultSensitivity extends Sensitivity {
  /** The change in units of T, on the scale of the verdict. */
  readonly inTolerances: number | null;
}

export interface ResultClaim {
  readonly id: string;
  readonly quantity: string;
  readonly unit: string;
  readonly verdict: VerdictWord;
  readonly remarks: readonly string[];
  readonly coverage: Coverage;
  readonly points: readonly ResultPoint[];
  readonly budget: readonly BudgetLine[];
  /** Absent where there is no budget, and in results of earlier versions. */
  readonly uncertainty?: ResultUncertainty;
  /** Of match-like claims: how well two imperfectly known waveforms can be compared. */
  readonly metricBound?: MetricBound;
  /** How far each setting moves the number; only of runs that also drew figures. */
  readonly sensitivities?: readonly ResultSensitivity[];
  readonly assumed: readonly string[];
  readonly settings: readonly UsedSetting[];
  readonly routeB: readonly number[];
  readonly findings: readonly Finding[];
  /** Readings under which a claim that differs or is unsettled would agree; hints to people, never part of a record. */
  readonly candidates: readonly Candidate[];
  /** What the search for them did; absent where none was made. */
  readonly search?: SearchOfClaim;
}

export interface ResultDocument {
  readonly format: 'counterfoil-result/1';
  readonly engine: string;
  readonly title: string;
  readonly files: readonly { readonly name: string; readonly bytes: number; readonly sha256: string }[];
  readonly claims: readonly ResultClaim[];
  /** What the files say of the words beside them; they move no number. Absent in results of earlier versions. */
  readonly guesses?: readonly SheetGuess[];
}

/** Figures travel beside the result, keyed by claim id: they are for eyes, not for the record. */
export type FiguresByClaim = Readonly<Record<string, readonly Figure[]>>;
