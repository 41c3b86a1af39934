import type { Metadata } from 'next';
import { TextField } from '@/app/_ui/primitives/control';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { Notice } from '@/app/_ui/primitives/notice';
import { AuthForm } from '../auth-form';
import { PasswordField } from '../password-field';
import { TwoSided } from '../two-sided';

export const metadata: Metadata = { title: 'Open an account' };

export default function SignUp() {
  const form = (
    <AuthForm
      path="sign-up/email"
      button="Open the account"
      busy="Opening it"
      done={<Notice kind="done" word="Next">If the address is free, a letter with a link is on its way to it. Open the link within a day, and the account is yours.</Notice>}
    >
      <TextField label="Name" name="name" autoComplete="name" required maxLength={120} hint="As it should stand on a record." />
      <TextField label="E-mail" name="email" type="email" autoComplete="email" required />
      <PasswordField name="password" isNew hint="15 characters or more. Four or five unrelated words do well." />
    </AuthForm>
  );
  return (
    <TwoSided title="Open an account" form={form}>
      <h2>What it is for</h2>
      <p>Lodging claims, confirming co-authorship, refereeing, editing. Your address is shown to nobody; your name stands on the records you author.</p>
      <p>As a referee you appear to authors as “Referee A” and never by name.</p>
      <p className="mt-2"><LinkButton href="/sign-in" tone="quiet">I have an account</LinkButton></p>
    </TwoSided>
  );
}
