import type { Transaction } from '@/db/client';
import { auditEntries } from '@/db/schema/audit';
import { userIdOf, type Actor } from '@/lib/policy/actor';

export interface AuditLine {
  readonly actor: Actor;
  /** `submission.lodge`, `file.add`, … */
  readonly action: string;
  readonly subjectKind: 'submission' | 'account' | 'job';
  readonly subjectId: string | null;
  readonly details?: Readonly<Record<string, unknown>>;
}

/** Only inside a transaction: the entry stands or falls with the act. Takes no Grant, since refusals are told too. */
export async function recordAudit(tx: Transaction, line: AuditLine): Promise<void> {
  await tx.insert(auditEntries).values({
    actorKind: line.actor.kind,
    actorId: userIdOf(line.actor),
    action: line.action,
    subjectKind: line.subjectKind,
    subjectId: line.subjectId,
    details: { ...line.details, ...(line.actor.kind === 'token' && { tokenId: line.actor.tokenId }) },
  });
}
