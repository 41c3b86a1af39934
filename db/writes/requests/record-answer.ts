import type { Transaction } from '@/db/client';
import { idempotencyKeys } from '@/db/schema/idempotency-keys';

export interface KeptAnswer {
  readonly userId: string;
  readonly key: string;
  readonly requestDigest: string;
  readonly status: number;
  readonly body: unknown;
}

/** A second row under the same key violates the primary key and undoes the second act with it. Takes no Grant: the act it belongs to had one. */
export async function recordAnswer(tx: Transaction, answer: KeptAnswer): Promise<void> {
  await tx.insert(idempotencyKeys).values(answer);
}
