import type { Problem } from '@/lib/kernel/problem';
import type { Result } from '@/lib/kernel/result';
import type { FiguresByClaim, ResultDocument } from '@/lib/pipeline/result';

/** What the boiler room asks of a worker thread: `threads/run-sheet.ts` is the one answer outside tests. */
export interface SheetJob {
  readonly sheet: unknown;
  readonly files: readonly { readonly name: string; readonly path: string }[];
  readonly withFigures: boolean;
  /** Look for readings under which claims that do not agree would. */
  readonly explain: boolean;
}

export interface SheetWatch {
  readonly onProgress: (fraction: number, doing: string) => void;
  readonly signal: AbortSignal;
}

export type ComputeSheet = (job: SheetJob, watch: SheetWatch) => Promise<Result<{ readonly result: ResultDocument; readonly figures: FiguresByClaim }, readonly Problem[]>>;
