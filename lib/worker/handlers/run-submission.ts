import { rm } from 'node:fs/promises';
import { findRunInputs } from '@/db/reads/runs/run';
import type { RunFinding } from '@/db/writes/runs/record-result';
import { startProgress } from '@/db/writes/runs/tell-progress';
import { ENGINE_VERSION } from '@/lib/engine/version';
import { enqueue } from '@/lib/jobs/enqueue';
import { parsePayload } from '@/lib/jobs/tasks';
import { completeRun } from '@/lib/services/runs/complete-run';
import { digestOf } from '@/lib/services/runs/inputs-digest';
import type { ComputeSheet } from '../compute';
import { fetchInputs } from '../fetch-inputs';
import { makeRunFolder } from '../run-folder';
import { progressTeller } from '../progress-teller';
import { stepLog } from '../step-log';
import type { Handler, HandlerRoom } from './handler';

type RunInputs = NonNullable<Awaited<ReturnType<typeof findRunInputs>>>;

/**
 * One run: inputs from the store, hashes checked, the pipeline in a thread, the result stored once.
 * Killed anywhere on the way, the job is tried again and ends with the same one result.
 */
export const runSubmission: Handler = async (raw, room, attempt) => {
  const { runId } = parsePayload('run-submission', raw);
  const run = await findRunInputs(room.database, runId);
  if (!run) throw new Error(`there is no run ${runId}`);
  if (run.done !== null) return;
  await startProgress(room.database, { runId, submissionId: run.submissionId, doing: 'fetching the files' }, attempt);
  const folder = await makeRunFolder();
  try {
    const finding = await compute(room, run, folder);
    if (!room.signal.aborted) await completeRun(room.database, run, finding);
  } catch (error) {
    if (!room.signal.aborted) throw error;
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
  // Told to stop is no failure: the run goes back as a new job, with all its tries.
  if (room.signal.aborted) await enqueue(room.database, 'run-submission', { runId }, { key: `run:${runId}` });
};

async function compute(room: HandlerRoom, run: RunInputs, folder: string): Promise<RunFinding> {
  const log = stepLog(() => performance.now());
  log.note('fetching the files');
  const files = await fetchInputs(room.store, run.inputs, folder);
  const teller = progressTeller(room.database, { runId: run.id, submissionId: run.submissionId });
  try {
    const done = await room.compute({ sheet: run.sheet, files, withFigures: true, explain: run.kind !== 'variation' }, { onProgress: (fraction, doing) => (log.note(doing), teller.note(fraction, doing)), signal: room.signal });
    return asFinding(done, log.steps());
  } finally {
    await teller.stop();
  }
}

function asFinding(done: Awaited<ReturnType<ComputeSheet>>, log: RunFinding['log']): RunFinding {
  if (!done.ok) return { outcome: 'refused', engine: ENGINE_VERSION, problems: done.error, log };
  const { result, figures } = done.value;
  return { outcome: 'measured', engine: result.engine, result, figures, resultDigest: digestOf(result), log };
}
