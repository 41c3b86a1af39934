import type { Metadata } from 'next';
import { TextField } from '@/app/_ui/primitives/control';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { Notice } from '@/app/_ui/primitives/notice';
import { AuthForm } from '../auth-form';
import { TwoSided } from '../two-sided';

export const metadata: Metadata = { title: 'Set a new password' };

export default function ForgottenPassword() {
  const form = (
    <AuthForm
      path="request-password-reset"
      button="Send the link"
      busy="Sending"
      done={<Notice kind="done" word="Next">If an account has this address, a letter with a link is on its way to it. The link works for one hour.</Notice>}
    >
      <TextField label="E-mail" name="email" type="email" autoComplete="username" required autoFocus />
    </AuthForm>
  );
  return (
    <TwoSided title="Set a new password" form={form}>
      <h2>What happens</h2>
      <p>You get a letter with a link that works once, for an hour. Setting the new password signs you out everywhere else.</p>
      <p>The answer here is the same whether or not the address has an account.</p>
      <p className="mt-2"><LinkButton href="/sign-in" tone="quiet">Back to sign-in</LinkButton></p>
    </TwoSided>
  );
}
