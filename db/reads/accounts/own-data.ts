import { asc, eq, inArray } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { apiTokens } from '@/db/schema/api-tokens';
import { comments } from '@/db/schema/comments';
import { decisions } from '@/db/schema/decisions';
import { revisionFiles, storedFiles } from '@/db/schema/files';
import { invitations } from '@/db/schema/invitations';
import { editorNotes, reports } from '@/db/schema/reports';
import { revisions, submissionPeople, submissions } from '@/db/schema/submissions';
import { threads } from '@/db/schema/threads';

/**
 * What one person put in, for that person. Each query selects by the person's own id and takes no column
 * that names anybody else: no inviter, no co-author, no letter of another referee.
 */
export const listOwnSubmissionsWhole = (reader: Reader, userId: string) =>
  reader
    .select({ id: submissions.id, title: submissions.title, state: submissions.state, part: submissionPeople.role, createdAt: submissions.createdAt })
    .from(submissionPeople)
    .innerJoin(submissions, eq(submissions.id, submissionPeople.submissionId))
    .where(eq(submissionPeople.userId, userId))
    .orderBy(asc(submissions.createdAt));

export const listRevisionsOf = async (reader: Reader, submissionIds: readonly string[]) =>
  submissionIds.length === 0
    ? []
    : reader
        .select({ id: revisions.id, submissionId: revisions.submissionId, number: revisions.number, title: revisions.title, statement: revisions.statement, sheet: revisions.sheet, lodgedAt: revisions.lodgedAt })
        .from(revisions)
        .where(inArray(revisions.submissionId, [...submissionIds]))
        .orderBy(asc(revisions.number));

export const listFilesOf = async (reader: Reader, revisionIds: readonly string[]) =>
  revisionIds.length === 0
    ? []
    : reader
        .select({ revisionId: revisionFiles.revisionId, name: revisionFiles.name, bytes: storedFiles.bytes, sha256: storedFiles.sha256 })
        .from(revisionFiles)
        .innerJoin(storedFiles, eq(storedFiles.id, revisionFiles.fileId))
        .where(inArray(revisionFiles.revisionId, [...revisionIds]))
        .orderBy(asc(revisionFiles.name));

export const listOwnReports = (reader: Reader, userId: string) =>
  reader
    .select({ submissionId: reports.submissionId, round: reports.round, revision: reports.revision, answers: reports.answers, recommendation: reports.recommendation, confidence: reports.confidence, handedInAt: reports.handedInAt })
    .from(reports)
    .where(eq(reports.refereeId, userId))
    .orderBy(asc(reports.handedInAt));

export const listOwnComments = (reader: Reader, userId: string) =>
  reader
    .select({ submissionId: threads.submissionId, threadId: comments.threadId, anchor: threads.anchor, body: comments.body, writtenAt: comments.writtenAt })
    .from(comments)
    .innerJoin(threads, eq(threads.id, comments.threadId))
    .where(eq(comments.writerId, userId))
    .orderBy(asc(comments.writtenAt));

export const listOwnNotes = (reader: Reader, userId: string) =>
  reader.select({ submissionId: editorNotes.submissionId, body: editorNotes.body, writtenAt: editorNotes.writtenAt }).from(editorNotes).where(eq(editorNotes.writerId, userId)).orderBy(asc(editorNotes.writtenAt));

export const listInvitationsToOneself = (reader: Reader, userId: string) =>
  reader
    .select({ submissionId: invitations.submissionId, state: invitations.state, statedNoConflict: invitations.statedNoConflict, invitedAt: invitations.invitedAt, answeredAt: invitations.answeredAt })
    .from(invitations)
    .where(eq(invitations.refereeId, userId))
    .orderBy(asc(invitations.invitedAt));

/** The prose is the editor's own; points and numbers of a letter are others' and stay out. */
export const listOwnDecisions = async (reader: Reader, userId: string) =>
  (
    await reader
      .select({ submissionId: decisions.submissionId, round: decisions.round, revision: decisions.revision, kind: decisions.kind, level: decisions.level, letter: decisions.letter, publicSentence: decisions.publicSentence, decidedAt: decisions.decidedAt })
      .from(decisions)
      .where(eq(decisions.decidedBy, userId))
      .orderBy(asc(decisions.decidedAt))
  ).map(({ letter, ...decision }) => ({ ...decision, prose: letter.prose }));

export const listOwnTokens = (reader: Reader, userId: string) =>
  reader
    .select({ name: apiTokens.name, hint: apiTokens.hint, scopes: apiTokens.scopes, createdAt: apiTokens.createdAt, expiresAt: apiTokens.expiresAt, lastUsedAt: apiTokens.lastUsedAt, revokedAt: apiTokens.revokedAt })
    .from(apiTokens)
    .where(eq(apiTokens.userId, userId))
    .orderBy(asc(apiTokens.createdAt));
