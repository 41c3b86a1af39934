import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createMailTransport, type MailTransport } from '@/lib/mail/transport';
import { startMailSink, type TestMailSink } from '../../support/fakes';

describe('a letter arrives as it was written', () => {
  let sink: TestMailSink;
  let transport: MailTransport;
  beforeAll(async () => {
    sink = await startMailSink();
    transport = createMailTransport({ SMTP_URL: sink.smtpUrl, MAIL_FROM: 'Counterfoil <desk@counterfoil.example>' });
  });
  afterAll(async () => {
    transport.close();
    await sink.stop();
  });

  const letter = {
    to: 'ada@harbour.example',
    subject: 'Report received: match ≥ 0.99 — Grüße, 数',
    text: `A referee has answered.\n\nhttp://127.0.0.1:3000/submissions/1?round=2&claim=C1\n\n${'long '.repeat(60)}\n∫ h² dt ≈ 0.9984(3) <script>alert(1)</script>\n`,
    messageId: '<outbox-1@counterfoil.example>',
    headers: { 'X-Counterfoil-Kind': 'report' },
  };

  it('keeps subject, text, recipient, Message-ID and own headers', async () => {
    await transport.sendMail(letter);
    const [received] = sink.messages();
    expect(received).toMatchObject({ id: 1, to: [letter.to], subject: letter.subject, messageId: letter.messageId });
    expect(received?.text.replaceAll('\r\n', '\n').trim()).toBe(letter.text.trim());
    expect(received?.headers['x-counterfoil-kind']).toBe('report');
    expect(received?.headers['from']).toContain('desk@counterfoil.example');
    expect(received?.headers).not.toHaveProperty('x-mailer');
  });

  it('the reader lists it, shows it escaped and gives it as JSON', async () => {
    const page = async (path: string): Promise<string> => (await fetch(sink.readerUrl + path)).text();
    expect(await page('/')).toContain('to ada@harbour.example');
    const shown = await page('/messages/1');
    expect(shown).toContain('&lt;script&gt;');
    expect(shown).not.toContain('<script');
    expect(shown).toContain('href="http://127.0.0.1:3000/submissions/1?round=2&amp;claim=C1"');
    expect(JSON.parse(await page('/messages.json'))).toHaveLength(1);
    expect((await fetch(`${sink.readerUrl}/messages/99`)).status).toBe(404);
  });
});
