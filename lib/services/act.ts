import { database, type Database, type Reader, type Transaction } from '@/db/client';
import { findSubmissionFacts } from '@/db/reads/submissions/submission-facts';
import { recordAudit } from '@/db/writes/audit/record-audit';
import { ok } from '@/lib/kernel/result';
import type { AccountAction, SubmissionAction } from '@/lib/policy/actions';
import type { Actor } from '@/lib/policy/actor';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { may, mayGenerally, type Grant, type SubmissionGrant } from '@/lib/policy/grant';
import { AppFailure, NOT_FOUND, type Outcome } from './app-error';
import { recordAnswerOnce } from './once';

/** What a verb needs at hand: a transaction, the right it was given, and the facts behind it. */
export interface Scene<A extends SubmissionAction> {
  readonly tx: Transaction;
  readonly actor: Actor;
  readonly grant: SubmissionGrant<A>;
  readonly facts: SubmissionFacts;
  /** Adds to the audit entry of this act. Never anything that a referee's identity could be read from. */
  readonly note: (details: Readonly<Record<string, unknown>>) => void;
}

interface ActOn<A extends SubmissionAction> {
  readonly actor: Actor;
  readonly action: A;
  readonly submissionId: string;
  /** Defaults to this process's database. */
  readonly database?: Database;
}

/**
 * One act on one submission: facts under a row lock, policy, the work, its audit entry and the kept
 * answer, all in one transaction. An error value undoes everything.
 */
export async function actOnSubmission<A extends SubmissionAction, T>(
  { actor, action, submissionId, database: db = database() }: ActOn<A>,
  work: (scene: Scene<A>) => Promise<Outcome<T>>,
): Promise<Outcome<T>> {
  return undoingErrors(db, async (tx) => {
    const facts = await findSubmissionFacts(tx, actor, submissionId, true);
    const grant = may(action, actor, facts);
    if (!grant.ok || facts === null) return grant.ok ? absent() : grant;
    let details: Readonly<Record<string, unknown>> = {};
    const note = (more: Readonly<Record<string, unknown>>) => void (details = { ...details, ...more });
    const done = await work({ tx, actor, grant: grant.value, facts, note });
    if (done.ok) await recordAudit(tx, { actor, action, subjectKind: 'submission', subjectId: submissionId, details });
    return done;
  });
}

interface GeneralScene<A extends AccountAction> {
  readonly tx: Transaction;
  readonly grant: Grant<A>;
  readonly note: (subjectKind: 'submission' | 'account' | 'job', subjectId: string | null, details?: Readonly<Record<string, unknown>>) => void;
}

/** One act that begins with no submission, such as creating one. */
export async function actGenerally<A extends AccountAction, T>(
  { actor, action, database: db = database() }: { readonly actor: Actor; readonly action: A; readonly database?: Database },
  work: (scene: GeneralScene<A>) => Promise<Outcome<T>>,
): Promise<Outcome<T>> {
  return undoingErrors(db, async (tx) => {
    const grant = mayGenerally(action, actor);
    if (!grant.ok) return grant;
    let line: Parameters<typeof recordAudit>[1] = { actor, action, subjectKind: 'account', subjectId: null };
    const done = await work({ tx, grant: grant.value, note: (subjectKind, subjectId, details) => void (line = { ...line, subjectKind, subjectId, ...(details && { details }) }) });
    if (done.ok) await recordAudit(tx, line);
    return done;
  });
}

/** Reads need no transaction; a denied one looks like an unknown id. */
export async function readSubmission<A extends SubmissionAction, T>(
  { actor, action, submissionId, database: db = database() }: ActOn<A>,
  work: (scene: { readonly reader: Reader; readonly actor: Actor; readonly grant: SubmissionGrant<A>; readonly facts: SubmissionFacts }) => Promise<Outcome<T>>,
): Promise<Outcome<T>> {
  const facts = await findSubmissionFacts(db, actor, submissionId);
  const grant = may(action, actor, facts);
  if (!grant.ok || facts === null) return { ok: false, error: NOT_FOUND };
  return work({ reader: db, actor, grant: grant.value, facts });
}

/** The dead end that the compiler asks for: a grant is never given without facts. */
const absent = (): never => {
  throw new Error('a grant without facts');
};

async function undoingErrors<T>(db: Database, work: (tx: Transaction) => Promise<Outcome<T>>): Promise<Outcome<T>> {
  try {
    return await db.transaction(async (tx) => {
      const done = await work(tx);
      if (!done.ok) throw new AppFailure(done.error);
      await recordAnswerOnce(tx, done.value);
      return ok(done.value);
    });
  } catch (error) {
    if (error instanceof AppFailure) return { ok: false, error: error.error };
    throw error;
  }
}
