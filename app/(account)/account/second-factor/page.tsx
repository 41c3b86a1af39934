import type { Metadata } from 'next';
import { loadOwn } from '@/lib/http/page-guard';
import { LACK_SENTENCES } from '@/lib/policy/lack';
import { getOwnAccount } from '@/lib/services/accounts/get-own-account';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { Notice } from '@/app/_ui/primitives/notice';
import { safeNext } from '../../auth-requests';
import { TwoSided } from '../../two-sided';
import { Enrol } from './enrol';
import { ManageFactor } from './manage-factor';

export const metadata: Metadata = { title: 'Second factor of your account' };

interface FactorProps {
  readonly searchParams: Promise<{ readonly next?: string | string[] }>;
}

export default async function AccountSecondFactor({ searchParams }: FactorProps) {
  const { next } = await searchParams;
  const account = await loadOwn('/account/second-factor', getOwnAccount);
  const form =
    account.lacks === 'confirmed-address' ? (
      <Notice kind="ask" word="First" actions={<LinkButton href="/account/address" tone="main">Give an address</LinkButton>}>{LACK_SENTENCES['confirmed-address']}</Notice>
    ) : account.secondFactor ? (
      <ManageFactor hasPassword={account.hasPassword} required={account.role !== 'member'} />
    ) : (
      <Enrol hasPassword={account.hasPassword} next={next === undefined ? '/account' : safeNext(next)} />
    );
  return (
    <TwoSided title="Second factor" form={form}>
      <h2>What it is</h2>
      <p>An authenticator on your telephone or computer shows a new code of six digits every half minute. After the password, or after ORCID, signing in asks for it.</p>
      <p>Editors and administrators cannot act without one. For all others it is a choice.</p>
      <p>Ten recovery codes stand in for a lost authenticator, each once.</p>
      <p className="mt-2"><LinkButton href="/account" tone="quiet">Back to the account</LinkButton></p>
    </TwoSided>
  );
}
