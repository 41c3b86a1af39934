import { asc, desc, eq } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { recordStandings, records, signingKeys } from '@/db/schema/records';

export async function findRecord(reader: Reader, id: string) {
  const [row] = await reader.select().from(records).where(eq(records.id, id));
  return row;
}
export type RecordRow = NonNullable<Awaited<ReturnType<typeof findRecord>>>;

/** The newest standing is the one that holds. */
export async function getStanding(reader: Reader, recordId: string) {
  const [row] = await reader.select().from(recordStandings).where(eq(recordStandings.recordId, recordId)).orderBy(desc(recordStandings.since), desc(recordStandings.id)).limit(1);
  if (!row) throw new Error('a record without a standing');
  return row;
}

export async function findNewestRecord(reader: Reader, submissionId: string) {
  const [row] = await reader.select({ id: records.id, revision: records.revision }).from(records).where(eq(records.submissionId, submissionId)).orderBy(desc(records.revision)).limit(1);
  return row;
}

/** Every record with its standing, the newest entry first. */
export const listRecords = (reader: Reader) => {
  const standing = reader
    .selectDistinctOn([recordStandings.recordId], { recordId: recordStandings.recordId, standing: recordStandings.standing })
    .from(recordStandings)
    .orderBy(recordStandings.recordId, desc(recordStandings.since), desc(recordStandings.id))
    .as('standing');
  return reader
    .select({ id: records.id, submissionId: records.submissionId, document: records.document, enteredAt: records.enteredAt, standing: standing.standing })
    .from(records)
    .innerJoin(standing, eq(standing.recordId, records.id))
    .orderBy(desc(records.enteredAt), asc(records.id));
};

export async function findPublicKey(reader: Reader, keyId: string): Promise<string | undefined> {
  const [row] = await reader.select({ publicKey: signingKeys.publicKey }).from(signingKeys).where(eq(signingKeys.id, keyId));
  return row?.publicKey;
}

export const listPublicKeys = (reader: Reader) => reader.select().from(signingKeys).orderBy(asc(signingKeys.firstUsedAt));
