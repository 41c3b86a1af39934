import { formatDay } from '@/app/views/dates';
import { quantityWord } from '@/app/views/quantity-word';
import { registerParams, usualOrder, type RegisterAsk, type RegisterOrder, type RegisterQuery } from '@/lib/services/records/register-query';
import { noiseWord, standingWord, verdictWord } from './filter-words';

const withParams = (path: string, query: RegisterQuery): string => {
  const params = registerParams(query);
  return params.size > 0 ? `${path}?${params}` : path;
};

export const registerHref = (query: RegisterQuery): string => withParams('/register', query);

/** An export is of the whole search, whatever its order and page. */
export const exportHref = (file: 'records.csv' | 'feed.atom', ask: RegisterAsk): string => withParams(`/register/${file}`, { ask, order: usualOrder(ask.text), page: 1 });

/** Another filter or order begins at the first page. */
export function changedHref(query: RegisterQuery, change: Partial<RegisterAsk>, order?: RegisterOrder): string {
  const ask = { ...query.ask, ...change };
  const kept = order ?? (query.order === 'relevance' ? usualOrder(ask.text) : query.order);
  return registerHref({ ask, order: kept, page: 1 });
}

/** The filters that are on; each can be taken off by itself, which the address then shows. */
export function filterTags(query: RegisterQuery): readonly { readonly label: string; readonly href: string }[] {
  const { text, quantity, verdict, noise, from, to, standing } = query.ask;
  const tag = (value: string | undefined, label: (value: string) => string, change: Partial<RegisterAsk>) => (value === undefined ? [] : [{ label: label(value), href: changedHref(query, change) }]);
  return [
    ...tag(text, (v) => `words: ${v}`, { text: undefined }),
    ...tag(quantity, quantityWord, { quantity: undefined }),
    ...tag(verdict, (v) => `a claim that ${verdictWord(v)}`, { verdict: undefined }),
    ...tag(noise, (v) => `noise curve: ${noiseWord(v)}`, { noise: undefined }),
    ...tag(from, (v) => `entered from ${formatDay(v)}`, { from: undefined }),
    ...tag(to, (v) => `entered until ${formatDay(v)}`, { to: undefined }),
    ...tag(standing, standingWord, { standing: undefined }),
  ];
}
