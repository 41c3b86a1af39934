import { z } from 'zod';

/**
 * What can be asked of the boiler room: the name of each job and the shape of its payload. The queue
 * behind it is hidden here; services enqueue inside their own transaction, the worker takes from it.
 */
export const TASKS = {
  /** Compute one run from its stored inputs. Idempotent: a run with a result is left alone. */
  'run-submission': z.strictObject({ runId: z.uuid() }),
  /** Send what waits in the outbox. */
  'deliver-outbox': z.strictObject({}),
  /** Let go of parts of files that nobody came back to finish. */
  'clear-uploads': z.strictObject({}),
} as const;

export type TaskName = keyof typeof TASKS;
export type Payload<T extends TaskName> = z.infer<(typeof TASKS)[T]>;

/** Tries before a job is laid aside for the administrator. */
export const TRIES: Readonly<Record<TaskName, number>> = { 'run-submission': 3, 'deliver-outbox': 25, 'clear-uploads': 3 };

export const parsePayload = <T extends TaskName>(task: T, raw: unknown): Payload<T> => TASKS[task].parse(raw) as Payload<T>;
