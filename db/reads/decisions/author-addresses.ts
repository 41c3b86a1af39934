import { asc, eq } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { users } from '@/db/schema/accounts';
import { submissionPeople } from '@/db/schema/submissions';

/** To whom a decision is told: author and co-authors, in printed order. */
export const listAuthorAddresses = (reader: Reader, submissionId: string) =>
  reader
    .select({ userId: users.id, name: users.name, email: users.email })
    .from(submissionPeople)
    .innerJoin(users, eq(users.id, submissionPeople.userId))
    .where(eq(submissionPeople.submissionId, submissionId))
    .orderBy(asc(submissionPeople.position));
