import type { Reader } from '@/db/client';
import { listDecisions } from '@/db/reads/decisions/decisions';
import { findAssignment, findSlot } from '@/db/reads/reviews/invitations';
import { getSubmissionHead } from '@/db/reads/submissions/submission-head';
import { ok } from '@/lib/kernel/result';
import type { SubmissionAction } from '@/lib/policy/actions';
import { isSignedIn, type Actor } from '@/lib/policy/actor';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { may } from '@/lib/policy/grant';
import { pseudonym } from '@/lib/reviews/anonymity';
import { formatState } from '@/lib/reviews/states';
import { readSubmission } from '@/lib/services/act';
import type { Outcome } from '@/lib/services/app-error';
import type { DeskView } from './desk-view';
import { numberChanges } from './number-changes';
import { findOfficialResult, type LodgedResult } from './official-result';
import { viewerOf } from './side';
import { viewDecision } from './view-decision';
import { viewInvitations } from './view-invitations';
import { viewNotes, viewReports } from './view-reports';
import { viewPrivateVariations, viewThreads } from './view-threads';

/** All that people said about one submission, as one of them may see it. */
export function getDesk(actor: Actor, submissionId: string): Promise<Outcome<DeskView>> {
  return readSubmission({ actor, action: 'review.read-threads', submissionId }, async ({ reader, facts }) => {
    const viewer = viewerOf(actor, facts);
    const can = (action: SubmissionAction): boolean => may(action, actor, facts).ok;
    const official = await findOfficialResult(reader, submissionId);
    const decisions = await listDecisions(reader, submissionId);
    const scene = { submissionId, viewer, revision: official?.revision ?? 0, result: official?.result ?? null, may: { reply: can('review.comment'), close: can('review.set-thread-state') } };
    const reports = await viewReports(reader, submissionId, viewer, decisions);
    const invitations = viewer.side === 'editor' ? await viewInvitations(reader, facts) : null;
    const handedIn = reports.some((r) => r.yours && r.round === facts.round);
    const waiting = decisions[0]?.kind === 'enter' && decisions[0].refusal === null;
    return ok({
      submissionId,
      title: official?.title ?? (await getSubmissionHead(reader, submissionId)).title,
      state: facts.state,
      stateWords: formatState(facts.state, facts.round),
      round: facts.round,
      revision: scene.revision,
      you: await whoReads(reader, actor, facts),
      report: viewer.side === 'referee' ? { due: await dueOf(reader, facts, viewer.userId), handedIn } : null,
      threads: await viewThreads(reader, scene),
      variations: await viewPrivateVariations(reader, scene),
      reports,
      decisions: decisions.map((d) => viewDecision(d, viewer.side === 'editor')),
      changes: official ? await changesSince(reader, submissionId, official) : [],
      notes: await viewNotes(reader, submissionId, viewer),
      invitations,
      may: {
        openThread: scene.result !== null && can('review.open-thread'),
        report: !handedIn && can('review.report'),
        noteToEditor: can('review.note-to-editor'),
        takeTriage: can('review.take') && !(await holds(reader, actor, submissionId)),
        invite: can('review.invite'),
        sendToReview: can('review.begin'),
        beginDeciding: can('review.call-for-decision'),
        decide: !waiting && (can('review.enter') || can('review.set-aside')),
      },
    });
  });
}

async function whoReads(reader: Reader, actor: Actor, facts: SubmissionFacts): Promise<DeskView['you']> {
  const name = isSignedIn(actor) ? actor.name : '';
  if (facts.authorship) return { role: facts.authorship, name };
  const slot = isSignedIn(actor) ? await findSlot(reader, facts.submissionId, actor.userId) : undefined;
  return slot === undefined ? { role: 'editor', name } : { role: 'referee', name: pseudonym(slot) };
}

/** Whoever holds it has nothing to take. */
async function holds(reader: Reader, actor: Actor, submissionId: string): Promise<boolean> {
  return isSignedIn(actor) && (await findAssignment(reader, submissionId))?.editorId === actor.userId;
}

async function dueOf(reader: Reader, facts: SubmissionFacts, userId: string): Promise<string | null> {
  const own = (await viewInvitations(reader, facts, userId)).find((i) => i.state === 'accepted');
  return own?.reportDue ?? null;
}

async function changesSince(reader: Reader, submissionId: string, official: LodgedResult): Promise<DeskView['changes']> {
  const before = official.revision > 1 ? await findOfficialResult(reader, submissionId, official.revision - 1) : undefined;
  return before?.result && official.result ? numberChanges(before.result, official.result) : [];
}
