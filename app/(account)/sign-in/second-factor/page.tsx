import type { Metadata } from 'next';
import { TextField } from '@/app/_ui/primitives/control';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { AuthForm } from '../../auth-form';
import { safeNext } from '../../auth-requests';
import { TwoSided } from '../../two-sided';

export const metadata: Metadata = { title: 'Second factor' };

interface SecondFactorProps {
  readonly searchParams: Promise<{ readonly next?: string | string[] }>;
}

export default async function SecondFactor({ searchParams }: SecondFactorProps) {
  const next = safeNext((await searchParams).next);
  const form = (
    <>
      <AuthForm path="two-factor/verify-totp" button="Continue" busy="Looking at the code" next={next}>
        <TextField label="Six digits from your authenticator" name="code" inputMode="numeric" autoComplete="one-time-code" pattern="\d{6}" maxLength={6} required autoFocus hint="A new code comes every 30 seconds; the one before is also taken. Each works once." />
      </AuthForm>
      <Disclosure summary="Use a recovery code" className="mt-4">
        <AuthForm path="two-factor/verify-backup-code" button="Continue with this code" busy="Looking at the code" next={next}>
          <TextField label="Recovery code" name="code" autoComplete="off" autoCapitalize="none" spellCheck={false} maxLength={11} required hint="One of those shown when the second factor was set up, such as aB3dE-9xYz0. It is used up." />
        </AuthForm>
      </Disclosure>
    </>
  );
  return (
    <TwoSided title="Second factor" form={form}>
      <h2>Why a second one</h2>
      <p>Who can decide or administer here proves it twice, so that a password read by somebody else opens nothing. Others may do the same.</p>
      <p>Neither your authenticator nor a recovery code at hand? Write to whoever runs this server: they can take the second factor off your account.</p>
      <p className="mt-2"><LinkButton href="/sign-in" tone="quiet">Begin again</LinkButton></p>
    </TwoSided>
  );
}
