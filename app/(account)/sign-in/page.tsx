import type { Metadata } from 'next';
import Link from 'next/link';
import type { Route } from 'next';
import { TextField } from '@/app/_ui/primitives/control';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { Notice } from '@/app/_ui/primitives/notice';
import { isOrcidConfigured } from '@/lib/auth/orcid';
import { webEnv } from '@/lib/env';
import { AuthForm } from '../auth-form';
import { safeNext } from '../auth-requests';
import { OrcidButton } from '../orcid-button';
import { PasswordField } from '../password-field';
import { providerSentence } from '../provider-words';
import { TwoSided } from '../two-sided';

export const metadata: Metadata = { title: 'Sign in' };

interface SignInProps {
  readonly searchParams: Promise<{ readonly next?: string | string[]; readonly error?: string | string[] }>;
}

export default async function SignIn({ searchParams }: SignInProps) {
  const asked = await searchParams;
  const next = safeNext(asked.next);
  const problem = providerSentence(asked.error);
  const form = (
    <>
      {problem && <div className="mb-4"><Notice kind="stop" word="Not yet" live="alert">{problem}</Notice></div>}
      {isOrcidConfigured(webEnv()) && (
        <>
          <OrcidButton path="sign-in/social" body={{ next }}>Sign in with ORCID</OrcidButton>
          <p className="my-4 text-ui text-ink-2">or with a password</p>
        </>
      )}
      <AuthForm path="sign-in/email" button="Sign in" busy="Signing in" next={next}>
        <TextField label="E-mail" name="email" type="email" autoComplete="username" required autoFocus />
        <PasswordField name="password" />
      </AuthForm>
      <p className="mt-4 text-ui"><Link href={'/forgotten-password' as Route} className="inline-flex min-h-8 items-center">Set a new password</Link></p>
    </>
  );
  return (
    <TwoSided title="Sign in" form={form}>
      <h2>Reading needs no account</h2>
      <p>Every record in the register, its files’ digests and its proof are open to all.</p>
      <p>An account is for those who lodge claims, referee or edit. One account serves all three: roles belong to a submission, not to a person.</p>
      <p className="mt-2 flex flex-wrap gap-2"><LinkButton href="/sign-up">Open an account</LinkButton><LinkButton href="/register" tone="quiet">Read the register</LinkButton></p>
    </TwoSided>
  );
}
