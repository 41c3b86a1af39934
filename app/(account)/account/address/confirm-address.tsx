'use client';
import { Trouble } from '@/app/(desk)/act-parts';
import { useAct } from '@/app/(desk)/use-act';
import { Button } from '@/app/_ui/primitives/button';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { confirmAddress } from '../actions';

/** A button and not the opening of the link itself: mail programs open links before people do. */
export function ConfirmAddress({ token, address }: { readonly token: string; readonly address: string | null }) {
  const confirming = useAct(confirmAddress);
  return (
    <div className="grid gap-4">
      <p>{address ? <>This confirms <b className="font-semibold">{address}</b> as the address of your account.</> : 'This confirms the address that the letter went to.'}</p>
      <Trouble trouble={confirming.trouble} />
      <Button tone="main" busy={confirming.busy ? 'Confirming' : null} onClick={() => void confirming.run({ token })} className="w-full">Confirm the address</Button>
      {confirming.trouble && <LinkButton href="/account/address">Ask for a new letter</LinkButton>}
    </div>
  );
}
