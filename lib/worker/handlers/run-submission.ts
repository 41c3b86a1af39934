import { rm } from 'node:fs/promises';
import { findRunInputs } from '@/db/reads/runs/run';
import { stopAsked } from '@/db/reads/runs/stop-asked';
import type { RunFinding } from '@/db/writes/runs/record-result';
import { startProgress } from '@/db/writes/runs/tell-progress';
import { ENGINE_VERSION } from '@/lib/engine/version';
import { enqueue } from '@/lib/jobs/enqueue';
import { parsePayload } from '@/lib/jobs/tasks';
import { completeRun, endStoppedRun } from '@/lib/services/runs/complete-run';
import { digestOf } from '@/lib/services/runs/inputs-digest';
import type { ComputeSheet } from '../compute';
import { fetchInputs } from '../fetch-inputs';
import { makeRunFolder } from '../run-folder';
import { progressTeller } from '../progress-teller';
import { stepLog } from '../step-log';
import { watchForStop } from '../stop-watch';
import type { Turn } from '../turns';
import type { Handler, HandlerRoom } from './handler';

type RunInputs = NonNullable<Awaited<ReturnType<typeof findRunInputs>>>;

/**
 * One run: inputs from the store, hashes checked, the pipeline in a thread, the result stored once.
 * Killed anywhere on the way, the job is tried again and ends with the same one result.
 */
export const runSubmission: Handler = async (raw, room, attempt, urgency = 0) => {
  const turn = room.turns?.enter(urgency);
  try {
    await runInTurn(raw, room, { attempt, urgency, turn });
  } finally {
    turn?.leave();
  }
};

interface Standing {
  readonly attempt: number;
  readonly urgency: number;
  readonly turn: Turn | undefined;
}

async function runInTurn(raw: unknown, room: HandlerRoom, { attempt, urgency, turn }: Standing): Promise<void> {
  const { runId } = parsePayload('run-submission', raw);
  const run = await findRunInputs(room.database, runId);
  if (!run) throw new Error(`there is no run ${runId}`);
  if (run.done !== null) return;
  if (await stopAsked(room.database, runId)) return endStoppedRun(room.database, run);
  await startProgress(room.database, { runId, submissionId: run.submissionId, doing: 'fetching the files' }, attempt);
  const folder = await makeRunFolder();
  try {
    const finding = await compute(room, run, { folder, turn });
    if (finding === null) return await endStoppedRun(room.database, run);
    if (!room.signal.aborted && !turn?.putOff.aborted) await completeRun(room.database, run, finding);
  } catch (error) {
    if (!room.signal.aborted) throw error;
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
  // Told to stop or put off is no failure: the run goes back as a new job, with all its tries.
  const putOff = turn?.putOff.aborted === true;
  if (room.signal.aborted || putOff) await enqueue(room.database, 'run-submission', { runId }, { key: `run:${runId}`, urgency, ...(putOff && { flags: ['put-off'] }) });
}

/** Null when whoever asked for the run wanted it no longer and there was no number yet. */
async function compute(room: HandlerRoom, run: RunInputs, { folder, turn }: { readonly folder: string; readonly turn: Turn | undefined }): Promise<RunFinding | null> {
  const log = stepLog(() => performance.now());
  log.note('fetching the files');
  const files = await fetchInputs(room.store, run.inputs, folder);
  const watch = watchForStop(room.database, run.id);
  const teller = progressTeller(room.database, { runId: run.id, submissionId: run.submissionId });
  try {
    const done = await room.compute({ sheet: run.sheet, files, withFigures: true, explain: run.kind !== 'variation', ...(run.otherwise && { otherwise: run.otherwise }) }, { onProgress: (fraction, doing) => (log.note(doing), teller.note(fraction, doing)), signal: room.signal, stop: watch.signal, ...(turn && { turn }) });
    return watch.signal.aborted && !done.ok ? null : asFinding(done, log.steps());
  } finally {
    watch.close();
    await teller.stop();
  }
}

function asFinding(done: Awaited<ReturnType<ComputeSheet>>, log: RunFinding['log']): RunFinding {
  if (!done.ok) return { outcome: 'refused', engine: ENGINE_VERSION, problems: done.error, log };
  const { result, figures, readings } = done.value;
  return { outcome: 'measured', engine: result.engine, result, figures, readings, resultDigest: digestOf(result), log };
}
