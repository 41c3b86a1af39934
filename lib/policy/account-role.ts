/** What an account may be asked to do here. Author, co-author and referee are never account roles but facts about one submission. */
export const ACCOUNT_ROLES = ['member', 'editor', 'administrator'] as const;
export type AccountRole = (typeof ACCOUNT_ROLES)[number];
