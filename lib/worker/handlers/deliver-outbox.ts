import type { Database } from '@/db/client';
import { claimDueMail, countWaiting, markSent, putOff, type OutboxRow } from '@/db/writes/outbox/deliver';
import { parsePayload } from '@/lib/jobs/tasks';
import { createMailTransport, type MailTransport } from '@/lib/mail/transport';
import type { Handler } from './handler';

/** A mail that no server wanted in some four days is given up, and shown to the administrator. */
const MAX_TRIES = 40;
const LONGEST_WAIT_S = 3 * 3600;

/** 15 s, 30 s, 1 min, … up to three hours. */
export const waitAfter = (attempts: number): number => Math.min(LONGEST_WAIT_S, 15 * 2 ** Math.min(attempts, 20));

/**
 * Sends what is due, one by one, each in its own transaction: the row is held while its mail is on the
 * way and marked afterwards, so a worker that dies in between sends it again under the same Message-ID.
 */
export async function deliverDueMail(database: Database, transport: MailTransport, signal?: AbortSignal): Promise<{ readonly sent: number; readonly putOff: number }> {
  const tally = { sent: 0, putOff: 0 };
  while (!signal?.aborted) {
    const outcome = await database.transaction(async (tx) => {
      const mail = await claimDueMail(tx);
      if (!mail) return undefined;
      const fault = await send(transport, mail);
      if (fault === null) await markSent(tx, mail.id);
      else await putOff(tx, mail.id, fault, waitAfter(mail.attempts), mail.attempts + 1 >= MAX_TRIES);
      return fault === null ? 'sent' : 'putOff';
    });
    if (outcome === undefined) break;
    tally[outcome]++;
  }
  return tally;
}

async function send(transport: MailTransport, mail: OutboxRow): Promise<string | null> {
  try {
    await transport.sendMail({ to: mail.recipient, subject: mail.subject, text: mail.body, messageId: mail.messageId, headers: mail.headers });
    return null;
  } catch (error) {
    return error instanceof Error ? error.message : String(error);
  }
}

/** While mail is waiting for a server that is away, the minute's sweep tries again; the job itself is done. */
export const deliverOutbox: Handler = async (payload, room) => {
  parsePayload('deliver-outbox', payload);
  if ((await countWaiting(room.database)) === 0) return;
  const transport = createMailTransport(room.mail);
  try {
    await deliverDueMail(room.database, transport, room.signal);
  } finally {
    transport.close();
  }
};
