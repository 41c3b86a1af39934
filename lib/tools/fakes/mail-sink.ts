import type { AddressInfo } from 'node:net';
import { SMTPServer, type SMTPServerDataStream, type SMTPServerSession } from 'smtp-server';
import { openMailBox, type MailBox } from '@/lib/tools/fakes/mail-box';
import type { ReceivedMail } from '@/lib/tools/fakes/mail-message';

export interface MailSink {
  readonly smtpUrl: string;
  messages(): readonly ReceivedMail[];
  stop(): Promise<void>;
}

/** Accepts every letter on loopback and keeps it; nothing is ever delivered to anybody. */
export async function startMailSink(options: { folder: string; port?: number }): Promise<MailSink> {
  const box = openMailBox(options.folder);
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    logger: false,
    onData: (stream, session, done) => void receive(box, stream, session).then(() => done(), done),
  });
  server.on('error', () => undefined); // a sender that hangs up is no reason to stop
  await new Promise<void>((resolve, reject) => {
    server.server.once('error', reject);
    server.listen(options.port ?? 0, '127.0.0.1', resolve);
  });
  const { port } = server.server.address() as AddressInfo;
  return {
    smtpUrl: `smtp://127.0.0.1:${port}`,
    messages: () => box.all(),
    stop: () => new Promise((resolve) => server.close(() => resolve())),
  };
}

async function receive(box: MailBox, stream: SMTPServerDataStream, session: SMTPServerSession): Promise<void> {
  const chunks: Buffer[] = [];
  for await (const chunk of stream) chunks.push(chunk as Buffer);
  const { mailFrom, rcptTo } = session.envelope;
  const from = mailFrom ? mailFrom.address : '';
  box.keep({ from, to: rcptTo.map((recipient) => recipient.address) }, Buffer.concat(chunks).toString('latin1'));
}
