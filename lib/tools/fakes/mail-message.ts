/** One received message, as the reader shows it and as tests ask for it at /messages.json. */
export interface ReceivedMail {
  /** Order of arrival, from 1. */
  readonly id: number;
  readonly receivedAt: string;
  readonly from: string;
  readonly to: readonly string[];
  readonly subject: string;
  readonly messageId: string;
  readonly headers: Readonly<Record<string, string>>;
  readonly text: string;
  /** Exactly as it came over the wire. */
  readonly raw: string;
}

type Parsed = Pick<ReceivedMail, 'subject' | 'messageId' | 'headers' | 'text'>;

/**
 * Reads the plain-text messages that this application sends: one part, or the first text part of
 * several; base64 and quoted-printable bodies; encoded words in headers.
 */
export function parseMail(raw: string): Parsed {
  const { headers, body } = splitMessage(raw);
  return {
    subject: decodeWords(headers['subject'] ?? ''),
    messageId: headers['message-id'] ?? '',
    headers,
    text: textOf(headers, body),
  };
}

function splitMessage(raw: string): { headers: Record<string, string>; body: string } {
  const end = raw.indexOf('\r\n\r\n');
  const head = end < 0 ? raw : raw.slice(0, end);
  const headers: Record<string, string> = {};
  for (const line of head.replace(/\r\n[ \t]+/g, ' ').split('\r\n')) {
    const colon = line.indexOf(':');
    if (colon > 0) headers[line.slice(0, colon).toLowerCase()] = line.slice(colon + 1).trim();
  }
  return { headers, body: end < 0 ? '' : raw.slice(end + 4) };
}

function textOf(headers: Record<string, string>, body: string): string {
  const boundary = /boundary="?([^";]+)"?/i.exec(headers['content-type'] ?? '')?.[1];
  if (!boundary) return decodeBody(body, headers['content-transfer-encoding'] ?? '7bit');
  const parts = body
    .split(`--${boundary}`)
    .slice(1)
    .map((part) => splitMessage(part.replace(/^\r\n/, '')));
  const text = parts.find((part) => /^text\/plain/i.test(part.headers['content-type'] ?? 'text/plain'));
  return text ? textOf(text.headers, text.body) : '';
}

function decodeBody(body: string, encoding: string): string {
  const name = encoding.toLowerCase();
  if (name === 'base64') return Buffer.from(body, 'base64').toString('utf8');
  if (name === 'quoted-printable') return decodeQuotedPrintable(body.replace(/=\r\n/g, ''));
  return Buffer.from(body, 'latin1').toString('utf8');
}

const decodeQuotedPrintable = (text: string): string =>
  Buffer.from(
    text.replace(/=([0-9A-F]{2})/gi, (_, hex: string) => String.fromCharCode(parseInt(hex, 16))),
    'latin1',
  ).toString('utf8');

const ENCODED_WORD = /=\?utf-8\?([BQ])\?([^?]*)\?=/gi;

function decodeWords(header: string): string {
  const joined = header.replace(/(\?=)\s+(=\?)/g, '$1$2'); // white space between encoded words is no text
  return joined.replace(ENCODED_WORD, (_, kind: string, text: string) =>
    kind.toUpperCase() === 'B' ? Buffer.from(text, 'base64').toString('utf8') : decodeQuotedPrintable(text.replaceAll('_', ' ')),
  );
}
