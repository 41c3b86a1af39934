import type { Metadata } from 'next';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { Notice } from '@/app/_ui/primitives/notice';
import { PlainState } from '@/app/_ui/primitives/page-state';
import { AuthForm } from '../auth-form';
import { PasswordField } from '../password-field';
import { TwoSided } from '../two-sided';

/** The link of the letter is a secret: the page passes no address on. */
export const metadata: Metadata = { title: 'Choose a new password', referrer: 'no-referrer' };

interface ResetProps {
  readonly searchParams: Promise<{ readonly token?: string | string[] }>;
}

export default async function ResetPassword({ searchParams }: ResetProps) {
  const { token } = await searchParams;
  if (typeof token !== 'string' || token === '') {
    return (
      <div className="wrap max-w-[800px] pt-10">
        <PlainState level={1} title="This link is not whole" actions={<LinkButton href="/forgotten-password" tone="main">Ask for a new one</LinkButton>}>
          <p>The address has no code in it. Mail programs sometimes break long links: copy the whole of it, or ask for a new letter.</p>
        </PlainState>
      </div>
    );
  }
  const form = (
    <AuthForm
      path="reset-password"
      button="Set the password"
      busy="Setting it"
      extra={{ token }}
      done={<Notice kind="done" actions={<LinkButton href="/sign-in" tone="main">Sign in</LinkButton>}>The new password is set, and you are signed out everywhere.</Notice>}
    >
      <PasswordField name="newPassword" label="New password" isNew hint="15 characters or more. Four or five unrelated words do well." />
    </AuthForm>
  );
  return (
    <TwoSided title="Choose a new password" form={form}>
      <h2>A good password</h2>
      <p>Length is what counts: four or five words that have nothing to do with one another, or what a password manager makes.</p>
    </TwoSided>
  );
}
