import type { TaskName } from '@/lib/jobs/tasks';
import { clearUploads } from './clear-uploads';
import { deliverOutbox } from './deliver-outbox';
import type { Handler } from './handler';
import { runSubmission } from './run-submission';

/** Which handler answers which job; one file each. */
export const HANDLERS: Readonly<Record<TaskName, Handler>> = {
  'run-submission': runSubmission,
  'deliver-outbox': deliverOutbox,
  'clear-uploads': clearUploads,
};
