/**
 * Threads: the pipeline off the main thread, so that the queue, the database and the clock of the
 * worker process go on while numbers are computed. A run can be stopped at once, takes no longer
 * than its limit, and cannot fill the heap of the process.
 */
import { availableParallelism, tmpdir } from 'node:os';
import { MessageChannel } from 'node:worker_threads';
import { Piscina } from 'piscina';
import type { Problem } from '@/lib/kernel/problem';
import { err } from '@/lib/kernel/result';
import type { ComputeSheet, SheetJob, SheetWatch } from '../compute';
import { askToEnd, askToStepAside, newWishes, searchHasBegun, type SheetTask, type ThreadNote, type Wishes } from './sheet-task';
import { openTimeLimit } from './time-limit';

export interface ThreadLimits {
  readonly threads: number;
  readonly timeLimitMs: number;
  /** Heap of one thread. Samples lie outside it: the readers' limits on rows and cells bound those. */
  readonly heapMb: number;
}

export const houseLimits: ThreadLimits = { threads: Math.min(2, availableParallelism()), timeLimitMs: 10 * 60_000, heapMb: 768 };

export interface SheetThreads {
  readonly run: ComputeSheet;
  readonly close: () => Promise<void>;
}

const openPool = (limits: ThreadLimits): Piscina<SheetTask, Awaited<ReturnType<ComputeSheet>>> =>
  new Piscina({
    filename: new URL('./sheet-thread-entry.mjs', import.meta.url).href,
    // The thread reads hostile files: it gets none of the secrets that this process holds.
    env: { NODE_ENV: process.env.NODE_ENV ?? 'production', TMPDIR: tmpdir() },
    minThreads: 0,
    maxThreads: limits.threads,
    // An idle thread keeps spectra of its last sheet; let them go.
    idleTimeout: 20_000,
    resourceLimits: { maxOldGenerationSizeMb: limits.heapMb, maxYoungGenerationSizeMb: Math.min(64, limits.heapMb / 8) },
  });

export function openSheetThreads(limits: ThreadLimits = houseLimits): SheetThreads {
  const pool = openPool(limits);
  const run: ComputeSheet = async (job, watch) => {
    const { port1, port2 } = new MessageChannel();
    const wishes = newWishes();
    const limit = openTimeLimit(limits.timeLimitMs);
    const note = followTurn(watch, (aside) => (limit.pause(aside), askToStepAside(wishes, aside)));
    port1.on('message', note);
    const byHand = endingByHand(watch.stop, wishes);
    const task: SheetTask = { ...job, port: port2, wishes };
    const ends = [watch.signal, limit.signal, byHand, ...(watch.turn ? [watch.turn.putOff] : [])];
    try {
      return await pool.run(task, { transferList: [port2], signal: AbortSignal.any(ends) });
    } catch (thrown) {
      return err([byHand.aborted ? STOPPED : problemOf(thrown, watch, limit.signal, limits)]);
    } finally {
      limit.close();
      port1.close();
    }
  };
  return { run, close: () => pool.destroy() };
}

/** The run was wanted no longer; nothing of it is kept. */
export const STOPPED: Problem = { code: 'worker/stopped', where: '', saw: 'a request to stop from whoever asked for the run', expected: 'the run to be let finish', hint: 'Ask for it again when you like.' };

/** Passes on what a thread tells, and its place among the others to it; a run that stands still says so. */
function followTurn({ turn, onProgress }: SheetWatch, stepAside: (aside: boolean) => void): (note: ThreadNote) => void {
  let last = { fraction: 0, doing: 'beginning' };
  let stands = false;
  turn?.follow((aside) => {
    stepAside(aside);
    if (aside !== stands) onProgress(last.fraction, aside ? LETS_OTHERS_PASS : last.doing);
    stands = aside;
  });
  return (note) => {
    if (note === 'searching') return turn?.searching();
    last = note;
    onProgress(note.fraction, note.doing);
  };
}

const LETS_OTHERS_PASS = 'waiting while more urgent runs compute';

/** Aborts at once while numbers are still to come; in the search it only leaves word. */
function endingByHand(stop: AbortSignal | undefined, wishes: Wishes): AbortSignal {
  const end = new AbortController();
  const asked = (): void => {
    askToEnd(wishes);
    if (!searchHasBegun(wishes)) end.abort();
  };
  if (stop?.aborted) asked();
  else stop?.addEventListener('abort', asked, { once: true });
  return end.signal;
}

function problemOf(thrown: unknown, watch: SheetWatch, limit: AbortSignal, limits: ThreadLimits): Problem {
  if (watch.signal.aborted || watch.turn?.putOff.aborted) return { code: 'worker/cancelled', where: '', saw: 'a request to stop', expected: 'the run to be let finish' };
  if (limit.aborted)
    return {
      code: 'worker/time-limit',
      where: '',
      saw: `a run longer than ${limits.timeLimitMs / 1000} s`,
      expected: 'a run within that time',
      hint: 'Split the sheet into several, or thin the waveforms.',
    };
  if (thrown instanceof Error && 'code' in thrown && thrown.code === 'ERR_WORKER_OUT_OF_MEMORY')
    return {
      code: 'worker/memory',
      where: '',
      saw: `a run that needs more than ${limits.heapMb} MB of heap`,
      expected: 'a run within that bound',
      hint: 'Split the sheet into several, or thin the waveforms.',
    };
  throw thrown;
}

let shared: SheetThreads | null = null;

/** Runs that a worker may have under way: two compute, the others stand still in their middle or in a search. */
export const RUN_SLOTS = 6;

/** The worker process's own pool, opened at the first run. */
export const runSheet: ComputeSheet = (job: SheetJob, watch: SheetWatch) => (shared ??= openSheetThreads({ ...houseLimits, threads: RUN_SLOTS })).run(job, watch);
