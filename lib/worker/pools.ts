import { run, type Runner, type RunnerOptions, type TaskList } from 'graphile-worker';
import { EventEmitter } from 'node:events';
import type { Database } from '@/db/client';
import type { TaskName } from '@/lib/jobs/tasks';
import { HANDLERS } from './handlers/index';
import type { HandlerRoom } from './handlers/handler';
import { layAsideSpentJobs } from './lay-aside';
import type { Liveness } from './liveness';
import { quietLogger, report } from './log';
import { houseLimits, RUN_SLOTS } from './threads/run-sheet';
import { Turns } from './turns';

export const LOOK_EVERY_MS = 1000;

export function tasksOf(names: readonly TaskName[], room: HandlerRoom): TaskList {
  return Object.fromEntries(
    names.flatMap((name) => {
      const handler = HANDLERS[name];
      // The queue's clock adds a field of its own to what it enqueues.
      const bare = ({ _cron: _, ...payload }: Record<string, unknown>): unknown => payload;
      return handler ? [[name, (payload: unknown, { job }: { job: { attempts: number; priority: number } }) => handler(bare(payload as Record<string, unknown>), room, job.attempts, job.priority)]] : [];
    }),
  );
}

type PoolOptions = Pick<RunnerOptions, 'concurrency' | 'crontab' | 'forbiddenFlags'>;

export async function startPool(database: Database, liveness: Liveness, taskList: TaskList, options: PoolOptions, events = new EventEmitter()): Promise<Runner> {
  const announced: Promise<void>[] = [];
  events.on('pool:create', ({ workerPool }: { workerPool: { id: string } }) => void announced.push(liveness.announce(workerPool.id)));
  events.on('job:failed', () => setTimeout(() => void layAsideSpentJobs(database).catch(report), 100).unref());
  const runner = await run({ ...options, pgPool: database.$client, taskList, events: events as never, noHandleSignals: true, pollInterval: LOOK_EVERY_MS, gracefulShutdownAbortTimeout: 500, logger: quietLogger });
  await Promise.all(announced);
  return runner;
}

/** Runs have a pool of their own: they compete for cores, and mail must not wait behind them. */
export function startRuns(database: Database, liveness: Liveness, room: HandlerRoom): Promise<Runner> {
  const turns = new Turns({ slots: RUN_SLOTS, cores: houseLimits.threads });
  const events = new EventEmitter();
  for (const answer of ['worker:getJob:empty', 'worker:getJob:error', 'job:start']) events.on(answer, () => turns.answered());
  return startPool(database, liveness, tasksOf(['run-submission'], { ...room, turns }), { concurrency: RUN_SLOTS, forbiddenFlags: () => turns.ask() }, events);
}
