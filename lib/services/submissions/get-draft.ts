import { findRevision } from '@/db/reads/submissions/revision';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { readSubmission } from '@/lib/services/act';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { beforeLodging } from './before-lodging';
import { findCheck } from './find-check';
import type { DraftView } from './submission-view';
import { viewCandidateAnswers, viewHead, viewRevision } from './view-parts';

/** The composer's view of the current revision, for its authors. */
export function getDraft(actor: Actor, submissionId: string): Promise<Outcome<DraftView>> {
  return readSubmission({ actor, action: 'submission.view-draft', submissionId }, async ({ reader, facts }) => {
    const { currentRevision, ...head } = await viewHead(reader, actor, facts);
    const row = await findRevision(reader, submissionId, currentRevision);
    if (!row) return { ok: false, error: NOT_FOUND };
    const revision = await viewRevision(reader, row);
    const check = await findCheck(reader, revision);
    return ok({ kind: 'draft', ...head, candidateAnswers: await viewCandidateAnswers(reader, submissionId), revision, check, beforeLodging: beforeLodging({ ...revision, authors: head.authors, check }) });
  });
}
