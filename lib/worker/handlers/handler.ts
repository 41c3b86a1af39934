import type { Database } from '@/db/client';
import type { MailEnv } from '@/lib/env';
import type { ObjectStore } from '@/lib/storage/object-store';
import type { ComputeSheet } from '../compute';

/** What a handler has at hand. `signal` aborts when the worker is told to stop. */
export interface HandlerRoom {
  readonly database: Database;
  readonly store: ObjectStore;
  readonly mail: MailEnv;
  readonly compute: ComputeSheet;
  readonly signal: AbortSignal;
}

/** One job. Returning means done; throwing means try again, up to the tries of `lib/jobs/tasks.ts`. */
export type Handler = (payload: unknown, room: HandlerRoom, attempt: number) => Promise<void>;
