/** Mail about an account itself. It is written to the outbox and sent by the worker: the web holds no way to send. */
export interface AccountMail {
  readonly kind: 'verify-address' | 'reset-password';
  readonly to: string;
  readonly name: string;
  readonly url: string;
}

type Post = (mail: AccountMail) => Promise<void>;
const shared = globalThis as { counterfoilAccountPost?: Post };

/** The outbox lies above this room, so it is handed in (`services/accounts/account-post.ts`). */
export function useAccountPost(post: Post): void {
  shared.counterfoilAccountPost = post;
}

export function postAccountMail(mail: AccountMail): Promise<void> {
  if (!shared.counterfoilAccountPost) throw new Error('no outbox was handed to the sign-in service');
  return shared.counterfoilAccountPost(mail);
}
