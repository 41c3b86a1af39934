import type { Metadata } from 'next';
import Link from 'next/link';
import type { ReactNode } from 'react';
import { loadFor } from '@/lib/http/page-guard';
import { getOwnAccount } from '@/lib/services/accounts/get-own-account';
import { Facts } from '@/app/_ui/primitives/facts';
import { Notice } from '@/app/_ui/primitives/notice';
import { AuthForm } from '../auth-form';
import { PasswordField } from '../password-field';
import { SignOutButton } from './sign-out-button';

export const metadata: Metadata = { title: 'Account' };

const roleWords = { member: 'member', editor: 'editor', administrator: 'administrator' } as const;

const Group = ({ id, title, hint, children }: { readonly id: string; readonly title: string; readonly hint: string; readonly children: ReactNode }) => (
  <section aria-labelledby={id} className="grid gap-x-10 gap-y-3 stack:grid-cols-[220px_minmax(0,1fr)]">
    <div><h2 id={id}>{title}</h2><p className="mt-1 text-small text-ink-2">{hint}</p></div>
    <div className="min-w-0">{children}</div>
  </section>
);

export default async function Account() {
  const account = await loadFor('/account', getOwnAccount);
  return (
    <div className="wrap pt-10">
      <div className="mx-auto grid max-w-[980px] gap-10">
        <h1>Account</h1>
        <Group id="you" title="You" hint="Shown on records you author.">
          <Facts facts={[['Name', account.name], ['Affiliation', account.affiliation ?? 'not given'], ['E-mail', account.email], ['Account', roleWords[account.role]]]} />
        </Group>
        <Group id="password" title="Password" hint="Setting a new one signs you out everywhere else.">
          <div className="max-w-[420px]">
            <AuthForm path="change-password" button="Change the password" busy="Changing it" extra={{ revokeOtherSessions: true }} done={<Notice kind="done">The new password is set. Every other session is signed out.</Notice>}>
              <PasswordField name="currentPassword" label="Present password" />
              <PasswordField name="newPassword" label="New password" isNew hint="15 characters or more. Four or five unrelated words do well." />
            </AuthForm>
            <p className="mt-3 text-ui"><Link href="/forgotten-password" className="inline-flex min-h-8 items-center">I do not know the present one</Link></p>
          </div>
        </Group>
        <Group id="tokens" title="Tokens" hint="For scripts that act for you at the interface.">
          <p className="text-ui"><Link href="/account/tokens" className="inline-flex min-h-8 items-center">Your tokens, their scopes and their last use</Link></p>
        </Group>
        <Group id="session" title="This session" hint="Ends by itself after 12 hours without use, and after 7 days in any case.">
          <SignOutButton />
        </Group>
      </div>
    </div>
  );
}
