import Link from 'next/link';
import { ActButton } from '@/app/(desk)/act-parts';
import { OrcidLine } from '@/app/_ui/claim/orcid-line';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { Notice } from '@/app/_ui/primitives/notice';
import { formatDay } from '@/app/views/dates';
import type { OwnAccount } from '@/lib/services/accounts/get-own-account';
import { AuthForm } from '../auth-form';
import { PasswordField } from '../password-field';
import { unlinkOrcid } from './actions';
import { LinkOrcid } from './link-orcid';

type Ways = Pick<OwnAccount, 'orcid' | 'hasPassword'>;

/** Present where ORCID is configured, or where an iD is linked from a time when it was. */
export function OrcidPart({ account, configured }: { readonly account: Ways; readonly configured: boolean }) {
  if (!account.orcid) return configured ? <LinkOrcid hasPassword={account.hasPassword} /> : <p className="text-ui text-ink-2">Sign-in with ORCID is not set up on this server.</p>;
  return (
    <div className="grid justify-items-start gap-3">
      <p><OrcidLine orcid={account.orcid.id} authenticated /> <span className="text-ui text-ink-2">since {formatDay(account.orcid.since)}</span></p>
      <ActButton act={unlinkOrcid} input={{}} busy="Unlinking" size="low">Unlink ORCID</ActButton>
    </div>
  );
}

export function PasswordPart({ hasPassword }: Pick<Ways, 'hasPassword'>) {
  if (!hasPassword) return <p className="text-ui">This account has no password. <Link href="/forgotten-password" className="inline-flex min-h-8 items-center">Set one by mail</Link></p>;
  return (
    <div className="max-w-[420px]">
      <Disclosure summary="Change the password">
        <AuthForm path="change-password" button="Change the password" busy="Changing it" extra={{ revokeOtherSessions: true }} done={<Notice kind="done">The new password is set. Every other session is signed out.</Notice>}>
          <PasswordField name="currentPassword" label="Present password" />
          <PasswordField name="newPassword" label="New password" isNew hint="15 characters or more. Four or five unrelated words do well." />
        </AuthForm>
      </Disclosure>
      <p className="mt-3 text-ui"><Link href="/forgotten-password" className="inline-flex min-h-8 items-center">I do not know the present one</Link></p>
    </div>
  );
}
