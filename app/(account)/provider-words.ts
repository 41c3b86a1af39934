/** Why somebody came back from ORCID without what they went for, by the code in the address. */
const SENTENCES: Readonly<Record<string, string>> = {
  access_denied: 'You came back from ORCID without signing in there. Nothing was changed.',
  account_already_linked_to_different_user: 'This ORCID iD belongs to another account here. Sign in there and unlink it first.',
  state_mismatch: 'The sign-in began in another window, or longer than five minutes ago. Try again.',
  state_not_found: 'The sign-in began in another window, or longer than five minutes ago. Try again.',
  unable_to_link_account: 'The session that began this has ended. Sign in and link ORCID again.',
};

export const providerSentence = (code: string | readonly string[] | undefined): string | null =>
  typeof code !== 'string' ? null : (SENTENCES[code] ?? `ORCID sign-in did not come to its end (${code.replace(/[^a-z_]/gi, '').slice(0, 60)}). Try again, or sign in with your password.`);
