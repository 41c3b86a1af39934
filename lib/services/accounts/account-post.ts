import { randomUUID } from 'node:crypto';
import { database } from '@/db/client';
import { useAccountPost, type AccountMail } from '@/lib/auth/account-mail';
import { resetPasswordLetter, verifyAddressLetter } from '@/lib/services/mail-outbox/letters';
import { queueMail } from '@/lib/services/mail-outbox/queue-mail';

/** Joins the sign-in service to the outbox; called once by whatever serves sign-in. */
export function joinAccountPost(): void {
  useAccountPost(post);
}

const post = (mail: AccountMail): Promise<void> =>
  database().transaction(async (tx) => {
    const letter = mail.kind === 'reset-password' ? resetPasswordLetter(mail) : verifyAddressLetter(mail);
    await queueMail(tx, mail.to, `${mail.kind}:${randomUUID()}`, letter);
  });
