import type { Database } from '@/db/client';
import type { MailEnv } from '@/lib/env';
import type { ObjectStore } from '@/lib/storage/object-store';
import type { ComputeSheet } from '../compute';
import type { Turns } from '../turns';

/** What a handler has at hand. `signal` aborts when the worker is told to stop. */
export interface HandlerRoom {
  readonly database: Database;
  readonly store: ObjectStore;
  readonly mail: MailEnv;
  readonly compute: ComputeSheet;
  readonly signal: AbortSignal;
  /** The runs under way in this process; a room without computes one at a time. */
  readonly turns?: Turns;
}

/** One job. Returning means done; throwing means try again, up to the tries of `lib/jobs/tasks.ts`. */
export type Handler = (payload: unknown, room: HandlerRoom, attempt: number, urgency?: number) => Promise<void>;
