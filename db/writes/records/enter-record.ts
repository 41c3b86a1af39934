import { and, eq, sql, TransactionRollbackError } from 'drizzle-orm';
import type { Database, Transaction } from '@/db/client';
import { recordStandings, records, signingKeys, signingRefusals } from '@/db/schema/records';
import { submissions } from '@/db/schema/submissions';
import { recordAudit } from '@/db/writes/audit/record-audit';

/**
 * The signer's writes. They take no Grant: only the signer's database role may make them, and it
 * judges from the tables and the store alone.
 */
const SIGNER = { kind: 'worker', name: 'signer' } as const;

export interface SignedRecord {
  readonly id: string;
  readonly submissionId: string;
  readonly decisionId: string;
  readonly revision: number;
  readonly level: number;
  readonly document: Buffer;
  readonly signature: Buffer;
  readonly documentDigest: string;
  readonly keyId: string;
  readonly supersedes: string | null;
}

/** Stores the record and moves the submission, all or nothing; false when somebody else was quicker. */
export async function enterRecord(db: Database, record: SignedRecord): Promise<boolean> {
  try {
    await db.transaction((tx) => enter(tx, record));
    return true;
  } catch (error) {
    if (error instanceof TransactionRollbackError) return false;
    throw error;
  }
}

async function enter(tx: Transaction, { supersedes, ...record }: SignedRecord): Promise<void> {
  const made = await tx.insert(records).values(record).onConflictDoNothing().returning({ id: records.id });
  if (made.length === 0 || !(await moveToEntered(tx, record.submissionId))) tx.rollback();
  await tx.insert(recordStandings).values({ recordId: record.id, standing: 'entered' });
  if (supersedes !== null) await tx.insert(recordStandings).values({ recordId: supersedes, standing: 'superseded', reason: `Replaced by ${record.id}.` });
  await recordAudit(tx, { actor: SIGNER, action: 'record.sign', subjectKind: 'submission', subjectId: record.submissionId, details: { recordId: record.id, keyId: record.keyId } });
}

async function moveToEntered(tx: Transaction, submissionId: string): Promise<boolean> {
  const moved = await tx
    .update(submissions)
    .set({ state: 'entered', stateChangedAt: sql`now()`, updatedAt: sql`now()` })
    .where(and(eq(submissions.id, submissionId), eq(submissions.state, 'deciding')))
    .returning({ id: submissions.id });
  return moved.length === 1;
}

export function refuseToSign(db: Database, refusal: { readonly decisionId: string; readonly submissionId: string; readonly code: string; readonly reason: string }): Promise<void> {
  return db.transaction(async (tx) => {
    const { decisionId, submissionId, code, reason } = refusal;
    await tx.insert(signingRefusals).values({ decisionId, code, reason }).onConflictDoNothing();
    await recordAudit(tx, { actor: SIGNER, action: 'record.refuse', subjectKind: 'submission', subjectId: submissionId, details: { decisionId, code } });
  });
}

export async function publishKey(db: Database, key: { readonly id: string; readonly publicKey: string }): Promise<void> {
  await db.insert(signingKeys).values(key).onConflictDoNothing();
}
