import type { RegisterAsk, RegisterOrder } from '@/db/reads/records/register';
import { RECORD_STANDINGS } from '@/lib/badges/standing';
import { didYouMean } from '@/lib/claims/nearest-name';
import { builtInCurves } from '@/lib/engine/noise/built-in-curves';
import { quantities } from '@/lib/engine/quantities/registry';
import type { Problem } from '@/lib/kernel/problem';
import { VERDICTS } from './register-words';

export type { RegisterAsk, RegisterOrder };

/** The register's search as an address says it. Page, feed, export and interface read the same words. */
export interface RegisterQuery {
  readonly ask: RegisterAsk;
  readonly order: RegisterOrder;
  /** From 1. */
  readonly page: number;
}
export type AddressParams = Readonly<Record<string, string | string[] | undefined>>;
export interface RegisterChoices {
  readonly quantities: readonly string[];
  readonly noises: readonly string[];
}

export const REGISTER_ORDERS = ['newest', 'oldest', 'title', 'relevance'] as const;
export const NOISE_WORDS = ['attached', 'none'] as const;
const longestText = 200;
const lastPage = 100_000;

/** A value that is not understood is left off and told, never dropped in silence. */
export function parseRegisterQuery(params: AddressParams, choices: RegisterChoices): { readonly query: RegisterQuery; readonly problems: readonly Problem[] } {
  const problems: Problem[] = [];
  const one = (name: string) => oneValue(params[name], name, problems);
  const among = <T extends string>(name: string, known: readonly T[]) => knownWord(one(name), name, known, problems);
  const text = searchText(one('text'), problems);
  const ask: RegisterAsk = {
    text,
    quantity: among('quantity', [...new Set([...quantities.keys(), ...choices.quantities])]),
    verdict: among('verdict', VERDICTS),
    noise: among('noise', [...new Set([...builtInCurves.map((curve) => curve.id), ...NOISE_WORDS, ...choices.noises])]),
    standing: among('standing', RECORD_STANDINGS),
    ...days(one('from'), one('to'), problems),
  };
  const order = orderOf(among('sort', REGISTER_ORDERS), text, problems);
  return { query: { ask, order, page: pageOf(one('page'), problems) }, problems };
}

/** The inverse, in one fixed order, so that equal searches have equal addresses. */
export function registerParams({ ask, order, page }: RegisterQuery): URLSearchParams {
  const sort = order === usualOrder(ask.text) ? undefined : order;
  const { text, quantity, verdict, noise, from, to, standing } = ask;
  const named = { text, quantity, verdict, noise, from, to, standing, sort, page: page > 1 ? String(page) : undefined };
  return new URLSearchParams(Object.entries(named).flatMap(([name, value]) => (value === undefined ? [] : [[name, value]])));
}

export const usualOrder = (text: string | undefined): RegisterOrder => (text === undefined ? 'newest' : 'relevance');
export const isAsking = (ask: RegisterAsk): boolean => Object.values(ask).some((value) => value !== undefined);

const shown = (value: string): string => `“${value.length > 40 ? `${value.slice(0, 40)}…` : value}”`;

function oneValue(value: string | string[] | undefined, name: string, problems: Problem[]): string | undefined {
  const all = (Array.isArray(value) ? value : [value]).map((v) => v?.trim()).filter((v): v is string => v !== undefined && v !== '');
  if (all.length > 1) problems.push({ code: 'register/given-twice', where: `/${name}`, saw: `${all.length} values`, expected: `one; ${shown(all[0] ?? '')} is used` });
  return all[0];
}

function knownWord<T extends string>(value: string | undefined, name: string, known: readonly T[], problems: Problem[]): T | undefined {
  if (value === undefined) return undefined;
  const found = known.find((word) => word === value);
  if (found !== undefined) return found;
  const hint = didYouMean(value, known);
  problems.push({ code: 'register/unknown-value', where: `/${name}`, saw: shown(value), expected: `one of ${known.join(', ')}`, ...(hint ? { hint } : {}) });
  return undefined;
}

function searchText(value: string | undefined, problems: Problem[]): string | undefined {
  if (value === undefined) return undefined;
  // A database text cannot hold the character nought, and nobody types the others.
  const clean = value.replace(/[\u0000-\u001f\u007f]+/g, ' ').trim();
  if (clean !== value) problems.push({ code: 'register/control-characters', where: '/text', saw: 'control characters', expected: 'words; the characters are read as spaces' });
  if (clean.length > longestText) problems.push({ code: 'register/too-long', where: '/text', saw: `${clean.length} characters`, expected: `at most ${longestText}; the first ${longestText} are searched for` });
  // The database's parser stacks every dash of a row of them, and has room for 32.
  return clean.replace(/-(?:\s*-)+/g, '-').slice(0, longestText) || undefined;
}

function days(from: string | undefined, to: string | undefined, problems: Problem[]): Pick<RegisterAsk, 'from' | 'to'> {
  const [first, last] = [day(from, 'from', problems), day(to, 'to', problems)];
  if (first === undefined || last === undefined || first <= last) return { from: first, to: last };
  problems.push({ code: 'register/days-reversed', where: '/to', saw: `${last}, which lies before ${first}`, expected: `a day from ${first} on` });
  return { from: first, to: undefined };
}

function day(value: string | undefined, name: string, problems: Problem[]): string | undefined {
  if (value === undefined) return undefined;
  const instant = /^\d{4}-\d{2}-\d{2}$/.test(value) && !value.startsWith('0000') ? new Date(`${value}T00:00:00Z`) : null;
  if (instant && !Number.isNaN(instant.getTime()) && instant.toISOString().startsWith(value)) return value;
  problems.push({ code: 'register/not-a-day', where: `/${name}`, saw: shown(value), expected: 'a day such as 2026-11-14' });
  return undefined;
}

function orderOf(asked: RegisterOrder | undefined, text: string | undefined, problems: Problem[]): RegisterOrder {
  if (asked !== 'relevance' || text !== undefined) return asked ?? usualOrder(text);
  problems.push({ code: 'register/nothing-to-rank', where: '/sort', saw: 'relevance without words to search for', expected: 'newest, oldest or title, or some words' });
  return 'newest';
}

function pageOf(value: string | undefined, problems: Problem[]): number {
  if (value === undefined) return 1;
  const page = /^\d{1,6}$/.test(value) ? Number(value) : 0;
  if (page >= 1 && page <= lastPage) return page;
  problems.push({ code: 'register/not-a-page', where: '/page', saw: shown(value), expected: 'a number from 1' });
  return 1;
}
