import type { TaskName } from '@/lib/jobs/tasks';
import { deliverOutbox } from './deliver-outbox';
import type { Handler } from './handler';
import { deliverOutbox } from './deliver-outbox';
import { runSubmission } from './run-submission';

/** Which handler answers which job; one file each. */
export const HANDLERS: Readonly<Partial<Record<TaskName, Handler>>> = {
  'run-submission': runSubmission,
  'deliver-outbox': deliverOutbox,
  'deliver-outbox': deliverOutbox,
};
