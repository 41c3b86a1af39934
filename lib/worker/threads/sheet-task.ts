import type { MessagePort } from 'node:worker_threads';
import type { SheetJob } from '../compute';

/** What crosses to the thread; the port carries progress back and is transferred. */
export interface SheetTask extends SheetJob {
  readonly port: MessagePort;
}

export interface ProgressNote {
  readonly fraction: number;
  readonly doing: string;
}
