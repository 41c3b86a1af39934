import type { Problem } from './problem';
import { err, ok, type Result } from './result';

const FORM = /^\d{4}-\d{4}-\d{4}-\d{3}[\dX]$/;

/** Sixteen characters in groups of four; says nothing about the last of them being right. */
export const hasOrcidForm = (text: string): boolean => FORM.test(text);

/** The last character that belongs to the fifteen digits before it: ISO 7064, mod 11-2. */
export function orcidCheckCharacter(digits: string): string {
  let total = 0;
  for (const digit of digits) total = (total + Number(digit)) * 2;
  const check = (12 - (total % 11)) % 11;
  return check === 10 ? 'X' : String(check);
}

export const orcidChecks = (id: string): boolean => hasOrcidForm(id) && orcidCheckCharacter(id.replaceAll('-', '').slice(0, 15)) === id.at(-1);

/** An iD that somebody typed: with or without the address before it, with or without hyphens. */
export function parseOrcidId(text: string): Result<string, Problem> {
  const bare = text.trim().replace(/^https?:\/\/(www\.)?orcid\.org\//i, '').replace(/\/$/, '');
  const characters = bare.replace(/[-\s]/g, '').toUpperCase();
  const id = (characters.match(/.{1,4}/g) ?? []).join('-');
  const problem = { where: '/orcid', saw: text.trim() || 'nothing' };
  if (!hasOrcidForm(id)) return err({ ...problem, code: 'accounts/orcid-form', expected: 'sixteen characters in groups of four, such as 0000-0000-0000-0001' });
  if (orcidChecks(id)) return ok(id);
  return err({ ...problem, code: 'accounts/orcid-check', expected: 'a last character that belongs to the fifteen before it', hint: 'Two digits may be swapped or one mistyped; copy the iD from your ORCID page.' });
}

/** The whole address is shown, never a part of it. */
export const orcidAddress = (id: string): string => `https://orcid.org/${id}`;
