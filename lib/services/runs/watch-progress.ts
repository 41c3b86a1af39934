import { database } from '@/db/client';
import { progressFeed } from '@/db/reads/runs/progress-feed';
import { findProgress, listProgress } from '@/db/reads/runs/run-progress';
import { findSubmissionFacts } from '@/db/reads/submissions/submission-facts';
import { listVariations } from '@/db/reads/variations/variations';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { fittingView } from '@/lib/services/submissions/get-submission';
import type { ProgressEvent } from '@/lib/services/submissions/submission-view';

export interface ProgressWatch {
  /** Runs the watcher may see that are to come or under way. */
  readonly running: () => Promise<readonly ProgressEvent[]>;
  /** One run, as it stands; undefined when it is not the watcher's to see. */
  readonly one: (runId: string) => Promise<ProgressEvent | undefined>;
  /** `null` means: look at everything again. Resolves when nothing said later can be missed. */
  readonly subscribe: (listener: (runId: string | null) => void) => Promise<() => void>;
}

/** Progress of the runs of one submission, for whoever may see them. */
export async function watchProgress(actor: Actor, submissionId: string): Promise<Outcome<ProgressWatch>> {
  const facts = await findSubmissionFacts(database(), actor, submissionId);
  if (!facts || !fittingView(actor, facts)) return { ok: false, error: NOT_FOUND };
  const userId = userIdOf(actor);
  const mine = async (row: { runId: string; kind: ProgressEvent['kind'] }): Promise<boolean> => {
    if (row.kind !== 'variation') return row.kind === 'official' || facts.authorship !== null;
    const own = userId === null ? [] : await listVariations(database(), submissionId, userId);
    return own.some((v) => v.runId === row.runId);
  };
  return ok({
    running: async () => {
      const rows = await listProgress(database(), submissionId);
      const seen = await Promise.all(rows.map(mine));
      return rows.filter((_, i) => seen[i]);
    },
    one: async (runId) => {
      const row = await findProgress(database(), runId);
      return row && (await mine(row)) ? row : undefined;
    },
    subscribe: (listener) => progressFeed().subscribe(submissionId, listener),
  });
}
