/**
 * Letters one may do without. All others are needed to do one's part or to keep one's account:
 * invitations, decisions, and what concerns address and password.
 */
export const OPTIONAL_LETTERS = ['reminder', 'report-received'] as const;
export type OptionalLetter = (typeof OPTIONAL_LETTERS)[number];
