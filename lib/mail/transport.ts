import { createTransport, type Transporter } from 'nodemailer';
import type { MailEnv } from '@/lib/env';

/**
 * The letter-box: hands one finished message to the mail server. What is said to whom is
 * decided elsewhere and kept in the outbox; a message is tried again under the same Message-ID,
 * so that a receiver can tell a repetition.
 */
export interface OutgoingMail {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  /** Stable over retries, with or without angle brackets. */
  readonly messageId: string;
  readonly headers?: Readonly<Record<string, string>>;
}

export interface MailTransport {
  sendMail(mail: OutgoingMail): Promise<void>;
  close(): void;
}

export function createMailTransport(env: MailEnv): MailTransport {
  const transporter = createTransport(env.SMTP_URL, { from: env.MAIL_FROM });
  return { sendMail: (mail) => send(transporter, mail), close: () => transporter.close() };
}

async function send(transporter: Transporter, mail: OutgoingMail): Promise<void> {
  const { to, subject, text, messageId, headers } = mail;
  await transporter.sendMail({
    to,
    subject,
    text,
    messageId,
    headers: { ...headers },
    // No library name: the headers of a letter about a review say nothing about who wrote when, with what.
    xMailer: false,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
}
