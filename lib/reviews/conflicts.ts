/** Conflicts of interest that can be seen from what the service knows (domain.md 6.2). */
export type ConflictLevel = 'bar' | 'ask' | 'note';
export type ConflictCode = 'on-the-submission' | 'same-mail-domain' | 'shared-work' | 'same-quantity';

export interface ConflictFlag {
  readonly code: ConflictCode;
  readonly level: ConflictLevel;
  readonly text: string;
}

export interface Candidate {
  readonly userId: string;
  readonly email: string;
}
export interface SubmissionPerson {
  readonly userId: string | null;
  readonly name: string;
  readonly email: string | null;
}
export interface ConflictFacts {
  readonly candidate: Candidate;
  /** Authors and co-authors of this submission. */
  readonly people: readonly SubmissionPerson[];
  /** People of this submission with whom the candidate is named on another one here within 36 months. */
  readonly sharedWork: readonly { readonly name: string; readonly months: number }[];
  /** Own live submissions of the candidate that claim one of the same quantities, within 12 months. */
  readonly sameQuantity: readonly { readonly quantity: string }[];
}

const mailDomain = (email: string): string => email.slice(email.lastIndexOf('@') + 1).trim().toLowerCase();
const sameMail = (a: string, b: string): boolean => a.trim().toLowerCase() === b.trim().toLowerCase();

function isOnSubmission({ candidate, people }: ConflictFacts): boolean {
  return people.some((p) => p.userId === candidate.userId || (p.email !== null && sameMail(p.email, candidate.email)));
}

function mailFlags({ candidate, people }: ConflictFacts): ConflictFlag[] {
  const domain = mailDomain(candidate.email);
  const same = people.filter((p) => p.email !== null && mailDomain(p.email) === domain).map((p) => p.name);
  if (same.length === 0) return [];
  return [{ code: 'same-mail-domain', level: 'ask', text: `Same mail domain (${domain}) as ${same.join(', ')}` }];
}

/** Every flag, the gravest first. A bar ends the matter: nothing else is worth listing beside it. */
export function findConflicts(facts: ConflictFacts): ConflictFlag[] {
  if (isOnSubmission(facts)) return [{ code: 'on-the-submission', level: 'bar', text: 'Author or co-author of this submission' }];
  const shared = facts.sharedWork.map<ConflictFlag>((w) => ({
    code: 'shared-work',
    level: 'ask',
    text: `On another submission with ${w.name}, ${w.months === 0 ? 'this month' : `${w.months} months ago`}`,
  }));
  const quantities = [...new Set(facts.sameQuantity.map((q) => q.quantity))].sort();
  const claims = quantities.map<ConflictFlag>((q) => ({ code: 'same-quantity', level: 'note', text: `Own claim of the same quantity (${q}) under review here` }));
  return [...mailFlags(facts), ...shared, ...claims];
}

export const isBarred = (flags: readonly ConflictFlag[]): boolean => flags.some((f) => f.level === 'bar');
/** An ask flag is no bar once the editor has written why, in one sentence that is kept. */
export const needsReason = (flags: readonly ConflictFlag[]): boolean => flags.some((f) => f.level === 'ask');
