import { z } from 'zod';
import { findRevision } from '@/db/reads/submissions/revision';
import { getSubmissionHead } from '@/db/reads/submissions/submission-head';
import { saveRevision } from '@/db/writes/submissions/save-revision';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { asDraftSheet } from './draft-sheet';
import { namesVersion, versionMoved } from './submission-tag';

const named = z.record(z.string().min(1).max(64), z.record(z.string(), z.json()));

/** Any part may be left out and then stays as it is. `version` is the one the edit was made on. */
export const draftChange = z.strictObject({
  version: z.int().min(1),
  title: z.string().max(300).optional(),
  statement: z.string().max(100_000).optional(),
  sheet: z
    .strictObject({
      waveforms: named.optional(),
      noise: named.optional(),
      claims: z.array(z.record(z.string(), z.json())).max(200).optional(),
    })
    .optional(),
});
export type DraftChange = z.infer<typeof draftChange>;

/** The same where an entity tag may name the version instead. */
export const draftPatch = draftChange.partial({ version: true });
export type DraftPatch = z.infer<typeof draftPatch>;

export const LODGED_ALREADY = 'This revision is lodged and stands. Begin the next revision to change anything.';

/** Saves the parts that are given; a stale version is a conflict, and the composer then shows both side by side. */
export function updateDraft(actor: Actor, submissionId: string, change: DraftPatch, ifMatch: readonly string[] | null = null): Promise<Outcome<{ readonly version: number }>> {
  return actOnSubmission({ actor, action: 'submission.edit', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    const { currentRevision } = await getSubmissionHead(tx, submissionId);
    const row = await findRevision(tx, submissionId, currentRevision);
    if (!row) return { ok: false, error: NOT_FOUND };
    if (ifMatch && !namesVersion(ifMatch, row)) return fail('precondition', versionMoved(row));
    const onVersion = change.version ?? row.version;
    const words = { title: change.title?.trim() ?? row.title, statement: change.statement ?? row.statement };
    const parts = Object.fromEntries(Object.entries(change.sheet ?? {}).filter(([, part]) => part !== undefined));
    const sheet = { ...asDraftSheet(row.sheet, words), ...parts };
    const version = await saveRevision(tx, grant, { revisionId: row.id, version: onVersion }, { ...words, sheet });
    if (version === undefined) return fail('conflict', `Somebody saved version ${row.version} meanwhile; this edit was made on version ${onVersion}. Compare both and save again.`);
    note({ revision: row.number, version });
    return ok({ version });
  });
}
