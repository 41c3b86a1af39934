import type { Reader } from '@/db/client';
import { findLatestRun, findMeasuredRun } from '@/db/reads/runs/run';
import { findLatestLodged, findRevision } from '@/db/reads/submissions/revision';
import { listLodgedRevisions } from '@/db/reads/submissions/submission-head';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { readSubmission } from '@/lib/services/act';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { viewRun } from '@/lib/services/runs/run-view';
import type { LodgedView } from './submission-view';
import { viewCandidateAnswers, viewHead, viewRevision } from './view-parts';

/** A lodged revision as authors, referees and the editor see it; the latest unless a number is given. */
export function getReview(actor: Actor, submissionId: string, revision?: number): Promise<Outcome<LodgedView>> {
  return readSubmission({ actor, action: 'submission.view-review', submissionId }, ({ reader, facts }) => viewLodged('review', reader, actor, facts, revision));
}

/** The same for everybody, once it is entered. */
export function getPublic(actor: Actor, submissionId: string, revision?: number): Promise<Outcome<LodgedView>> {
  return readSubmission({ actor, action: 'submission.view-public', submissionId }, ({ reader, facts }) => viewLodged('public', reader, actor, facts, revision));
}

async function viewLodged(kind: LodgedView['kind'], reader: Reader, actor: Actor, facts: SubmissionFacts, number?: number): Promise<Outcome<LodgedView>> {
  const row = number === undefined ? await findLatestLodged(reader, facts.submissionId) : await findRevision(reader, facts.submissionId, number);
  if (!row?.lodgedAt) return { ok: false, error: NOT_FOUND };
  const { currentRevision: _current, ...head } = await viewHead(reader, actor, facts);
  const latest = await findLatestRun(reader, row.id, 'official');
  const run = latest?.outcome === 'measured' ? latest : ((await findMeasuredRun(reader, row.id, 'official')) ?? latest);
  const lodged = await listLodgedRevisions(reader, facts.submissionId);
  return ok({
    kind,
    ...head,
    title: row.title,
    candidateAnswers: kind === 'review' ? await viewCandidateAnswers(reader, facts.submissionId) : [],
    revision: await viewRevision(reader, row),
    revisions: lodged.flatMap((r) => (r.lodgedAt ? [{ number: r.number, lodgedAt: r.lodgedAt.toISOString() }] : [])),
    run: run ? viewRun(run) : null,
    laterRun: latest && latest.id !== run?.id ? viewRun(latest) : null,
  });
}
