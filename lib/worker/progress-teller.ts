import type { Database } from '@/db/client';
import { tellProgress } from '@/db/writes/runs/tell-progress';

/** Between two writes of progress: quick enough for an eye, slow enough for a database. */
const EVERY_MS = 250;

interface Run {
  readonly runId: string;
  readonly submissionId: string;
}

/**
 * Takes progress as often as it comes and writes it a few times a second, the latest each time.
 * Losing a note is no fault, so a failed write is swallowed; the result has its own transaction.
 */
export function progressTeller(db: Database, run: Run) {
  let latest: { fraction: number; doing: string } | null = null;
  let timer: NodeJS.Timeout | null = null;
  let writing: Promise<void> = Promise.resolve();

  const write = (): void => {
    timer = null;
    const note = latest;
    latest = null;
    if (note) writing = writing.then(() => tellProgress(db, { ...run, ...note })).catch(() => undefined);
  };
  return {
    note(fraction: number, doing: string): void {
      if (!Number.isFinite(fraction)) return;
      latest = { fraction: Math.min(1, Math.max(0, fraction)), doing: doing.slice(0, 200) };
      timer ??= setTimeout(write, EVERY_MS);
    },
    /** Nothing is written after this resolves. */
    async stop(): Promise<void> {
      if (timer) clearTimeout(timer);
      timer = null;
      latest = null;
      await writing;
    },
  };
}
