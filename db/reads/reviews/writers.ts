import { eq } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { users } from '@/db/schema/accounts';
import { invitations } from '@/db/schema/invitations';
import { submissionPeople } from '@/db/schema/submissions';
import type { Writer } from '@/lib/reviews/anonymity';

/**
 * Everybody who can have written something on one submission, by id. Whoever is neither author nor
 * referee is an editor; a referee keeps their letter also after being relieved.
 */
export async function loadWriters(reader: Reader, submissionId: string): Promise<(userId: string) => Promise<Writer>> {
  const known = new Map<string, Writer>();
  const referees = await reader
    .select({ userId: invitations.refereeId, name: users.name, slot: invitations.slot })
    .from(invitations)
    .innerJoin(users, eq(users.id, invitations.refereeId))
    .where(eq(invitations.submissionId, submissionId));
  for (const r of referees) known.set(r.userId, { ...r, side: 'referee' });
  const authors = await reader
    .select({ userId: submissionPeople.userId, name: users.name })
    .from(submissionPeople)
    .innerJoin(users, eq(users.id, submissionPeople.userId))
    .where(eq(submissionPeople.submissionId, submissionId));
  for (const a of authors) known.set(a.userId, { ...a, side: 'authors', slot: null });
  return async (userId) => {
    const writer = known.get(userId) ?? (await editor(reader, userId));
    known.set(userId, writer);
    return writer;
  };
}

async function editor(reader: Reader, userId: string): Promise<Writer> {
  const [row] = await reader.select({ name: users.name }).from(users).where(eq(users.id, userId));
  if (!row) throw new Error('a writer without an account');
  return { userId, name: row.name, side: 'editor', slot: null };
}
