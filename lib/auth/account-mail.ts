/** Mail about an account itself, handed to the outbox and sent by the worker: the web holds no way to send. */
export interface AccountMail {
  readonly kind: 'verify-address' | 'reset-password';
  readonly to: string;
  readonly name: string;
  readonly url: string;
}

export async function postAccountMail(mail: AccountMail): Promise<void> {
  void mail;
  throw new Error('the outbox is not connected');
}
