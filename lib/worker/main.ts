/**
 * The boiler room: a process of its own, under a role of its own, that takes jobs from the queue one
 * by one and puts results into the cellar. It may die at any moment: what it had is taken up by the
 * next, and done once.
 */
import { openDatabase, useDatabase, type Database } from '@/db/client';
import { workerEnv, type WorkerEnv } from '@/lib/env';
import { TASKS, type TaskName } from '@/lib/jobs/tasks';
import { createS3Store } from '@/lib/storage/s3-store';
import { endWithParent } from '@/lib/tools/process';
import { assertDurable } from './assert-durable';
import type { HandlerRoom } from './handlers/handler';
import { layAsideSpentJobs } from './lay-aside';
import { openLiveness, type Liveness } from './liveness';
import { report } from './log';
import { LOOK_EVERY_MS, startPool, startRuns, tasksOf } from './pools';
import { sweepRunFolders } from './run-folder';
import { runSheet } from './threads/run-sheet';

/** Looks for dead workers and spent jobs until told to stop. */
function keepLooking(database: Database, liveness: Liveness, signal: AbortSignal): void {
  const look = async (): Promise<void> => {
    try {
      await liveness.freeDead();
      await layAsideSpentJobs(database);
    } catch (error) {
      if (!signal.aborted) report(error);
    }
    if (!signal.aborted) setTimeout(() => void look(), LOOK_EVERY_MS).unref();
  };
  void look();
}

async function start(env: WorkerEnv): Promise<() => Promise<void>> {
  const stopping = new AbortController();
  const database = openDatabase(env.WORKER_DATABASE_URL, { max: 12, application_name: 'counterfoil-worker', onError: report });
  useDatabase(database);
  if (env.NODE_ENV === 'production' && !env.DEMO) await assertDurable(database);
  await sweepRunFolders().catch(report);
  const liveness = await openLiveness(env.WORKER_DATABASE_URL, (error) => {
    report(error);
    if (!stopping.signal.aborted) process.exit(1); // the supervisor starts another
  });
  const room: HandlerRoom = { database, store: createS3Store(env), mail: env, compute: runSheet, signal: stopping.signal };
  const others = (Object.keys(TASKS) as TaskName[]).filter((name) => name !== 'run-submission');
  const cron = ['* * * * * deliver-outbox ?jobKey=outbox-sweep&max=1', '17 * * * * clear-uploads ?jobKey=uploads-sweep&max=1'].join('\n');
  const runners = [await startRuns(database, liveness, room)];
  const otherTasks = tasksOf(others, room);
  if (Object.keys(otherTasks).length > 0) runners.push(await startPool(database, liveness, otherTasks, { concurrency: 1, crontab: cron }));
  keepLooking(database, liveness, stopping.signal);
  return async () => {
    stopping.abort();
    await Promise.allSettled(runners.map((runner) => runner.stop()));
    await liveness.close();
    await database.$client.end();
  };
}

const stop = await start(workerEnv());
endWithParent(stop);
console.log(JSON.stringify({ level: 'info', at: new Date().toISOString(), where: 'worker', message: 'ready' }));
