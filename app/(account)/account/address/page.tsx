import type { Metadata } from 'next';
import { loadOwn } from '@/lib/http/page-guard';
import { getOwnAccount } from '@/lib/services/accounts/get-own-account';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { Notice } from '@/app/_ui/primitives/notice';
import { safeNext } from '../../auth-requests';
import { TwoSided } from '../../two-sided';
import { AddressForm } from './address-form';
import { ConfirmAddress } from './confirm-address';
import { GiveUp } from './give-up';

/** The link of the letter is a secret: the page passes no address on. */
export const metadata: Metadata = { title: 'Your address', referrer: 'no-referrer' };

interface AddressProps {
  readonly searchParams: Promise<{ readonly token?: string | string[]; readonly next?: string | string[] }>;
}

export default async function Address({ searchParams }: AddressProps) {
  const { token, next } = await searchParams;
  const asked = typeof token === 'string' && /^[\w-]{20,100}$/.test(token) ? token : null;
  const account = await loadOwn(asked ? `/account/address?token=${asked}` : '/account/address', getOwnAccount);
  const open = account.lacks === 'confirmed-address';
  const form = !open ? (
    <Notice kind="done" actions={<LinkButton href={safeNext(next)} tone="main">Go on</LinkButton>}>The address of this account is confirmed: {account.email}.</Notice>
  ) : asked ? (
    <ConfirmAddress token={asked} address={account.addressAsked} />
  ) : (
    <AddressForm name={account.name} asked={account.addressAsked} />
  );
  return (
    <TwoSided title="Your address" form={form}>
      <h2>Why it is asked for</h2>
      <p>ORCID says who you are and gives no address. Decisions and invitations come by letter, so an account acts only once an address is confirmed; until then it reads.</p>
      <p>Your address is shown to nobody. Two accounts are never joined by an address.</p>
      {open && account.orcid && <GiveUp />}
    </TwoSided>
  );
}
