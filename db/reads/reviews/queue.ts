import { and, asc, desc, eq, inArray, isNotNull, notExists, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { users } from '@/db/schema/accounts';
import { decisions } from '@/db/schema/decisions';
import { assignments, invitations } from '@/db/schema/invitations';
import { records, signingRefusals } from '@/db/schema/records';
import { reports } from '@/db/schema/reports';
import { runProgress, runResults, runs } from '@/db/schema/runs';
import { revisions, submissionPeople, submissions } from '@/db/schema/submissions';
import { REVIEW_STATES } from '@/lib/policy/submission-state';

/** Submissions under review in which this editor has no part of their own. */
export const listUnderReview = (reader: Reader, editorId: string) =>
  reader
    .select({
      id: submissions.id,
      state: submissions.state,
      round: submissions.round,
      since: submissions.stateChangedAt,
      editorId: assignments.editorId,
      editorName: users.name,
    })
    .from(submissions)
    .leftJoin(assignments, eq(assignments.submissionId, submissions.id))
    .leftJoin(users, eq(users.id, assignments.editorId))
    .where(
      and(
        inArray(submissions.state, [...REVIEW_STATES]),
        notExists(reader.select({ one: sql`1` }).from(submissionPeople).where(and(eq(submissionPeople.submissionId, submissions.id), eq(submissionPeople.userId, editorId)))),
        notExists(
          reader.select({ one: sql`1` }).from(invitations)
            .where(and(eq(invitations.submissionId, submissions.id), eq(invitations.refereeId, editorId), inArray(invitations.state, ['asked', 'accepted']))),
        ),
      ),
    )
    .orderBy(asc(submissions.stateChangedAt));

export const listAuthorNames = (reader: Reader, ids: readonly string[]) =>
  reader
    .select({ submissionId: submissionPeople.submissionId, name: users.name, affiliation: users.affiliation })
    .from(submissionPeople)
    .innerJoin(users, eq(users.id, submissionPeople.userId))
    .where(inArray(submissionPeople.submissionId, [...ids]))
    .orderBy(asc(submissionPeople.position));

export const listLiveReferees = (reader: Reader, ids: readonly string[]) =>
  reader
    .select({
      submissionId: invitations.submissionId,
      slot: invitations.slot,
      state: invitations.state,
      invitedAt: invitations.invitedAt,
      answeredAt: invitations.answeredAt,
      reportId: reports.id,
    })
    .from(invitations)
    .innerJoin(submissions, eq(submissions.id, invitations.submissionId))
    .leftJoin(reports, and(eq(reports.submissionId, invitations.submissionId), eq(reports.refereeId, invitations.refereeId), eq(reports.round, submissions.round)))
    .where(and(inArray(invitations.submissionId, [...ids]), inArray(invitations.state, ['asked', 'accepted'])));

const verdicts = sql<{ claim: string; verdict: string }[] | null>`(
  select json_agg(json_build_object('claim', c.value->>'id', 'verdict', c.value->>'verdict') order by c.ordinality)
    from json_array_elements(${runResults.result}->'claims') with ordinality c)`;

/** Newest lodged revision first, with its official run if there is one. */
export const listLodgedRuns = (reader: Reader, ids: readonly string[]) =>
  reader
    .select({ submissionId: revisions.submissionId, revision: revisions.number, title: revisions.title, progress: runProgress.state, outcome: runResults.outcome, verdicts })
    .from(revisions)
    .leftJoin(runs, and(eq(runs.revisionId, revisions.id), eq(runs.kind, 'official')))
    .leftJoin(runProgress, eq(runProgress.runId, runs.id))
    .leftJoin(runResults, eq(runResults.runId, runs.id))
    .where(and(inArray(revisions.submissionId, [...ids]), isNotNull(revisions.lodgedAt)))
    .orderBy(desc(revisions.number), desc(runs.requestedAt));

/** The newest attempt first. */
export const listEntering = (reader: Reader, ids: readonly string[]) =>
  reader
    .select({ submissionId: decisions.submissionId, revision: decisions.revision, recordId: records.id, refusal: signingRefusals.reason })
    .from(decisions)
    .leftJoin(records, eq(records.decisionId, decisions.id))
    .leftJoin(signingRefusals, eq(signingRefusals.decisionId, decisions.id))
    .where(and(inArray(decisions.submissionId, [...ids]), eq(decisions.kind, 'enter')))
    .orderBy(desc(decisions.decidedAt));
