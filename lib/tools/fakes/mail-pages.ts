import type { ReceivedMail } from '@/lib/tools/fakes/mail-message';

/** The pages of the demo's mail reader: no script, everything that came by mail is escaped. */
const ENTITIES: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };
export const escapeHtml = (text: string): string => text.replace(/[&<>"']/g, (character) => ENTITIES[character] ?? character);

export const STYLE = `
:root{color-scheme:light dark;--page:light-dark(#FBFAF6,#12171E);--sheet:light-dark(#fff,#1A212B);--ink:light-dark(#1B2430,#E9ECEF);--ink-2:light-dark(#4A5563,#AEB8C4);--link:light-dark(#1F4E79,#8DBBE8);--hair:light-dark(#BEC6BF,#3C4855)}
*{box-sizing:border-box}body{margin:0;background:var(--page);color:var(--ink);font:16px/24px "Source Sans 3",system-ui,sans-serif}
main{max-width:72ch;margin:0 auto;padding:24px 16px}h1{font-size:28px;line-height:36px;margin:0 0 8px}p{margin:0 0 16px}a{color:var(--link)}.quiet{color:var(--ink-2)}
ol{list-style:none;margin:0;padding:0}li{background:var(--sheet);border:1px solid var(--hair);border-radius:2px;padding:12px 16px;margin-bottom:8px;overflow-wrap:anywhere}
pre{background:var(--sheet);border:1px solid var(--hair);border-radius:2px;padding:16px;white-space:pre-wrap;overflow-wrap:anywhere;font:inherit}dt{color:var(--ink-2)}dd{margin:0 0 8px;overflow-wrap:anywhere}`;

const page = (title: string, body: string): string =>
  `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${escapeHtml(title)}</title><link rel="stylesheet" href="/style.css"></head><body><main>${body}</main></body></html>`;

export function listPage(letters: readonly ReceivedMail[]): string {
  const rows = letters
    .toReversed()
    .map(
      (letter) =>
        `<li><a href="/messages/${letter.id}">${escapeHtml(letter.subject || '(no subject)')}</a><br><span class="quiet">to ${escapeHtml(letter.to.join(', '))} · ${escapeHtml(letter.receivedAt)}</span></li>`,
    );
  const list =
    rows.length > 0
      ? `<ol>${rows.join('')}</ol>`
      : '<p>No letter has been sent yet. Ask for a password reset, or invite a referee, and it will be here.</p>';
  return page(
    'Letters of the demo',
    `<h1>Letters of the demo</h1><p class="quiet">Every letter this copy of Counterfoil sends ends here. Nothing leaves this machine.</p>${list}`,
  );
}

export function letterPage(letter: ReceivedMail): string {
  const fact = (name: string, value: string): string => `<dt>${name}</dt><dd>${escapeHtml(value)}</dd>`;
  const facts =
    fact('From', letter.headers['from'] ?? letter.from) +
    fact('To', letter.to.join(', ')) +
    fact('Received (UTC)', letter.receivedAt) +
    fact('Message-ID', letter.messageId);
  return page(
    letter.subject,
    `<p><a href="/">All letters</a></p><h1>${escapeHtml(letter.subject || '(no subject)')}</h1><dl>${facts}</dl><pre>${linked(escapeHtml(letter.text))}</pre>`,
  );
}

export const missingPage = (): string => page('No such letter', '<h1>No such letter</h1><p><a href="/">All letters</a></p>');

/** Works on escaped text: an address ends before any entity, so nothing can close the attribute. */
const linked = (escaped: string): string =>
  escaped.replace(/https?:\/\/(?:[^\s<>&]|&amp;)+/g, (address) => `<a href="${address}">${address}</a>`);
