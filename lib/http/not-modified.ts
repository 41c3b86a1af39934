import { holdsAlready } from './json-answer';

/** Whole seconds, as HTTP dates are. */
export const httpDate = (at: Date): string => at.toUTCString();

/** Does the asker hold this state already? An entity tag is believed before a date (RFC 9110, 13.2.2). */
export function isUnchangedFor(headers: Headers, etag: string, changedAt: Date): boolean {
  const tags = headers.get('if-none-match');
  if (tags !== null) return holdsAlready(tags, etag);
  const since = Date.parse(headers.get('if-modified-since') ?? '');
  return !Number.isNaN(since) && Math.floor(changedAt.getTime() / 1000) * 1000 <= since;
}
