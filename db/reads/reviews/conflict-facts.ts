import { and, eq, gt, inArray, ne, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import type { Reader } from '@/db/client';
import { users } from '@/db/schema/accounts';
import { revisions, submissionPeople, submissions } from '@/db/schema/submissions';
import { REVIEW_STATES } from '@/lib/policy/submission-state';
import type { ConflictFacts } from '@/lib/reviews/conflicts';

const LOOK_BACK = sql`now() - interval '36 months'`;

/** What the database knows that could speak against asking this person. */
export async function findConflictFacts(reader: Reader, submissionId: string, candidate: ConflictFacts['candidate']): Promise<ConflictFacts> {
  const people = await reader
    .select({ userId: users.id, name: users.name, email: users.email })
    .from(submissionPeople)
    .innerJoin(users, eq(users.id, submissionPeople.userId))
    .where(eq(submissionPeople.submissionId, submissionId));
  return {
    candidate,
    people,
    sharedWork: await sharedWork(reader, submissionId, candidate.userId),
    sameQuantity: await sameQuantity(reader, submissionId, candidate.userId),
  };
}

/** Authors of this submission with whom the candidate is an author of another one here. */
async function sharedWork(reader: Reader, submissionId: string, userId: string) {
  const here = alias(submissionPeople, 'here');
  const there = alias(submissionPeople, 'there');
  const own = alias(submissionPeople, 'own');
  const rows = await reader
    .select({ name: users.name, months: sql<number>`min(extract(epoch from now() - ${submissions.createdAt}) / 2629800)::int` })
    .from(here)
    .innerJoin(there, and(eq(there.userId, here.userId), ne(there.submissionId, submissionId)))
    .innerJoin(own, and(eq(own.submissionId, there.submissionId), eq(own.userId, userId)))
    .innerJoin(submissions, eq(submissions.id, there.submissionId))
    .innerJoin(users, eq(users.id, here.userId))
    .where(and(eq(here.submissionId, submissionId), gt(submissions.createdAt, LOOK_BACK)))
    .groupBy(users.id, users.name)
    .orderBy(users.name);
  return rows;
}

const quantitiesOf = (sheet: unknown): string[] => {
  const claims = (sheet as { claims?: readonly { quantity?: unknown }[] } | null)?.claims;
  return Array.isArray(claims) ? claims.map((c: { quantity?: unknown }) => c.quantity).filter((q): q is string => typeof q === 'string') : [];
};

/** Quantities that the candidate claims in a submission of their own now under review, and this one claims too. */
async function sameQuantity(reader: Reader, submissionId: string, userId: string) {
  const own = await reader
    .select({ sheet: revisions.sheet })
    .from(submissionPeople)
    .innerJoin(submissions, eq(submissions.id, submissionPeople.submissionId))
    .innerJoin(revisions, and(eq(revisions.submissionId, submissions.id), eq(revisions.number, submissions.currentRevision)))
    .where(and(eq(submissionPeople.userId, userId), ne(submissions.id, submissionId), inArray(submissions.state, [...REVIEW_STATES]), gt(submissions.stateChangedAt, sql`now() - interval '12 months'`)));
  const here = await reader
    .select({ sheet: revisions.sheet })
    .from(revisions)
    .innerJoin(submissions, and(eq(submissions.id, revisions.submissionId), eq(submissions.currentRevision, revisions.number)))
    .where(eq(revisions.submissionId, submissionId));
  const claimed = new Set(here.flatMap((row) => quantitiesOf(row.sheet)));
  return own.flatMap((row) => quantitiesOf(row.sheet)).filter((quantity) => claimed.has(quantity)).map((quantity) => ({ quantity }));
}
