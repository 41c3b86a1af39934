import { describe, expect, it } from 'vitest';
import { parseMail } from '@/lib/tools/fakes/mail-message';
import { letterPage, listPage } from '@/lib/tools/fakes/mail-pages';

const lines = (...text: string[]): string => text.join('\r\n');

describe('a letter is read as it was meant', () => {
  it('quoted-printable with soft line ends', () => {
    const mail = parseMail(
      lines('Subject: =?UTF-8?Q?match_=E2=89=A5_0.99?=', 'Content-Transfer-Encoding: quoted-printable', '', 'one =E2=88=', '=AB two=20'),
    );
    expect(mail).toMatchObject({ subject: 'match ≥ 0.99', text: 'one ∫ two ' });
  });

  it('base64, and a subject in two encoded words', () => {
    const mail = parseMail(
      lines('Subject: =?UTF-8?B?R3LDvA==?=', ' =?UTF-8?B?w59l?=', 'Content-Transfer-Encoding: base64', '', 'R3LDvMOfZQ=='),
    );
    expect(mail).toMatchObject({ subject: 'Grüße', text: 'Grüße' });
  });

  it('the text part of several', () => {
    const part = (type: string, text: string): string[] => ['--b', `Content-Type: ${type}`, '', text];
    expect(
      parseMail(
        lines(
          'Content-Type: multipart/alternative; boundary="b"',
          '',
          ...part('text/html', '<b>no</b>'),
          ...part('text/plain', 'yes'),
          '--b--',
        ),
      ).text.trim(),
    ).toBe('yes');
  });
});

describe('the reader shows hostile letters harmlessly', () => {
  const hostile = '"><script>alert(1)</script><img src=x onerror=alert(1)>';
  const letter = {
    id: 1,
    receivedAt: hostile,
    from: hostile,
    to: [hostile],
    subject: hostile,
    messageId: hostile,
    headers: { from: hostile },
    text: `https://x.example/"onmouseover=alert(1) ${hostile}`,
    raw: '',
  };

  it.each([
    ['the list', listPage([letter])],
    ['the letter', letterPage(letter)],
  ])('%s has no tag and no attribute of theirs', (_which, html) => {
    expect(html).not.toMatch(/<script|<img/);
    expect(html).not.toMatch(/<[^>]*\s(onmouseover|onerror)=/);
  });
});
