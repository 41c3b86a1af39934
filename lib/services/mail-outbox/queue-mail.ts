import { randomUUID } from 'node:crypto';
import type { Transaction } from '@/db/client';
import { isDeclined } from '@/db/reads/accounts/account';
import { writeMail } from '@/db/writes/outbox/write-mail';
import { enqueue } from '@/lib/jobs/enqueue';
import { appOrigin } from './app-origin';
import type { Letter } from './letters';

/**
 * Mail goes through an outbox: written in the transaction of the act that causes it, sent by the
 * worker afterwards, however long a mail server is away. Headers say nothing but an id of its own.
 * False when its reader does not want letters of this kind.
 */
export async function queueMail(tx: Transaction, to: string, dedupeKey: string, { kind, subject, body }: Letter): Promise<boolean> {
  if (kind && (await isDeclined(tx, to, kind))) return false;
  const host = new URL(appOrigin()).hostname;
  await writeMail(tx, { to, subject, body, dedupeKey, messageId: `<${randomUUID()}@${host}>` });
  await enqueue(tx, 'deliver-outbox', {}, { key: 'deliver-outbox' });
  return true;
}
