import { z } from 'zod';
import { ok } from '@/lib/kernel/result';
import { fail, type Outcome } from './app-error';

/**
 * Lists come in pages. A cursor names the last thing seen and nothing else: no moment, no count, so
 * that it tells nobody when somebody else acted.
 */
export const pageQuery = {
  limit: z.coerce.number().int().min(1).max(100).default(50).describe('How many at most, 1 to 100.'),
  cursor: z.string().min(1).max(60).optional().describe('`next` of the page before.'),
};

export interface PageAsk {
  readonly limit: number;
  readonly cursor?: string | undefined;
}

export interface Page<T> {
  readonly items: readonly T[];
  /** Cursor of the next page; null on the last. */
  readonly next: string | null;
}

export const pageSchema = <T extends z.ZodType>(item: T) => z.object({ items: z.array(item), next: z.string().nullable().describe('Cursor of the next page; null on the last.') });

export const cursorOf = (id: string): string => Buffer.from(id).toString('base64url');
export const idOfCursor = (cursor: string): string => Buffer.from(cursor, 'base64url').toString('utf8');

export const noSuchPlace = (cursor: string) =>
  fail('invalid', 'The cursor is none of this list. Begin without one, and pass on `next` as it comes.', [{ code: 'http/cursor', where: '/cursor', saw: JSON.stringify(cursor.slice(0, 60)), expected: '`next` of a page of this list' }]);

/** The page of a list that is short enough to be at hand whole. */
export function pageOf<T>(all: readonly T[], { limit, cursor }: PageAsk, idOf: (item: T) => string): Outcome<Page<T>> {
  const seen = cursor === undefined ? -1 : all.findIndex((item) => idOf(item) === idOfCursor(cursor));
  if (cursor !== undefined && seen < 0) return noSuchPlace(cursor);
  const items = all.slice(seen + 1, seen + 1 + limit);
  const last = items.at(-1);
  return ok({ items, next: last !== undefined && seen + 1 + limit < all.length ? cursorOf(idOf(last)) : null });
}
