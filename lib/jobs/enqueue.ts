import { sql, type SQL } from 'drizzle-orm';
import { TRIES, type Payload, type TaskName } from './tasks';
import { flagsOf, type WaitingFlag } from './urgency';

/** A transaction, as far as this room knows one. */
interface SqlRunner {
  execute(query: SQL): PromiseLike<unknown>;
}

interface JobOptions {
  /** A second job under the same key replaces the first while that has not begun. */
  readonly key?: string;
  /** Jobs of one queue run one after the other. */
  readonly queue?: string;
  /** Of `urgency.ts`; as a person's own check when absent. */
  readonly urgency?: number;
  readonly flags?: readonly WaitingFlag[];
}

/** Adds a job in the caller's transaction: if the act is undone, so is its job. */
export async function enqueue<T extends TaskName>(tx: SqlRunner, task: T, payload: Payload<T>, { key, queue, urgency = 0, flags = [] }: JobOptions = {}): Promise<void> {
  const words = [...flagsOf(urgency), ...flags].join(',') || null;
  await tx.execute(
    sql`select public.enqueue_job(${task}, ${JSON.stringify(payload)}::jsonb, ${key ?? null}, ${TRIES[task]}, ${queue ?? null}, ${urgency}, string_to_array(${words}, ','))`,
  );
}
