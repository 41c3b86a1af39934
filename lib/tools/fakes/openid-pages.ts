import { STYLE, escapeHtml } from '@/lib/tools/fakes/mail-pages';
import { OPENID_PEOPLE } from '@/lib/tools/fakes/openid-people';

/** The one page of the local OpenID provider: who are you? Links alone, no script and no form. */
export { STYLE };

const page = (title: string, body: string): string =>
  `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${escapeHtml(title)}</title><link rel="stylesheet" href="/style.css"></head><body><main><h1>${escapeHtml(title)}</h1>${body}</main></body></html>`;

export function choosingPage(asked: URLSearchParams): string {
  const link = (more: Readonly<Record<string, string>>): string => escapeHtml(`/authorize?${new URLSearchParams([...asked, ...Object.entries(more)])}`);
  const people = OPENID_PEOPLE.map(({ id, name }) => `<li><a href="${link({ person: id })}">Sign in as ${escapeHtml(name)}</a><br><span class="quiet">${id}</span></li>`);
  return page(
    'Who are you?',
    `<p class="quiet">This page stands in for ORCID on this machine alone. The people are invented, and the last character of each iD is wrong on purpose.</p><ol>${people.join('')}</ol><p><a href="${link({ person: 'none' })}">None of them: go back</a></p>`,
  );
}

export const refusalPage = (sentence: string): string => page('This request is not in order', `<p>${escapeHtml(sentence)}</p>`);
