import { randomUUID } from 'node:crypto';
import type { Transaction } from '@/db/client';
import { writeMail } from '@/db/writes/outbox/write-mail';
import { enqueue } from '@/lib/jobs/enqueue';
import { appOrigin } from './app-origin';
import type { Letter } from './letters';

/**
 * Mail goes through an outbox: written in the transaction of the act that causes it, sent by the
 * worker afterwards, however long a mail server is away. Headers say nothing but an id of its own.
 */
export async function queueMail(tx: Transaction, to: string, dedupeKey: string, letter: Letter): Promise<void> {
  const host = new URL(appOrigin()).hostname;
  await writeMail(tx, { to, ...letter, dedupeKey, messageId: `<${randomUUID()}@${host}>` });
  await enqueue(tx, 'deliver-outbox', {}, { key: 'deliver-outbox' });
}
