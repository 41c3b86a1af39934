import type { Problem } from '@/lib/kernel/problem';
import type { Result } from '@/lib/kernel/result';
import type { ReadOtherwise } from '@/lib/explain/read-otherwise';
import type { ReadingsByClaim } from '@/lib/pipeline/explain/offered-readings';
import type { FiguresByClaim, ResultDocument } from '@/lib/pipeline/result';
import type { Turn } from './turns';

/** What the boiler room asks of a worker thread: `threads/run-sheet.ts` is the one answer outside tests. */
export interface SheetJob {
  readonly sheet: unknown;
  readonly files: readonly { readonly name: string; readonly path: string }[];
  readonly withFigures: boolean;
  /** Look for readings under which claims that do not agree would. */
  readonly explain: boolean;
  /** Of variations: what is read otherwise than sheet and files say. */
  readonly otherwise?: ReadOtherwise;
}

export interface SheetWatch {
  readonly onProgress: (fraction: number, doing: string) => void;
  readonly signal: AbortSignal;
  /** Whoever asked for the run wants it no longer: a search ends with what it has, anything before it ends at once. */
  readonly stop?: AbortSignal;
  /** Its place among the runs under way; one that computes alone needs none. */
  readonly turn?: Turn;
}

export type ComputeSheet = (job: SheetJob, watch: SheetWatch) => Promise<Result<{ readonly result: ResultDocument; readonly figures: FiguresByClaim; readonly readings: ReadingsByClaim }, readonly Problem[]>>;
