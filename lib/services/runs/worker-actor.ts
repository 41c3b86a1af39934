import type { Actor } from '@/lib/policy/actor';

export const WORKER: Actor = { kind: 'worker', name: 'worker' };

/** Channel on which the worker says that something about a run has changed; the payload is ids only. */
export const PROGRESS_CHANNEL = 'run_progress';
