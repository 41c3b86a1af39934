import type { Transaction } from '@/db/client';
import { outbox } from '@/db/schema/outbox';

export interface Mail {
  readonly to: string;
  readonly subject: string;
  readonly body: string;
  /** What happened, once: a second row under the same key is not written. */
  readonly dedupeKey: string;
  readonly messageId: string;
}

/** Takes no Grant: a mail follows from an act that had one, in the same transaction. */
export async function writeMail(tx: Transaction, mail: Mail): Promise<void> {
  await tx
    .insert(outbox)
    .values({ recipient: mail.to, subject: mail.subject, body: mail.body, dedupeKey: mail.dedupeKey, messageId: mail.messageId })
    .onConflictDoNothing({ target: outbox.dedupeKey });
}
