'use client';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { Dialog } from '@/app/_ui/primitives/dialog';
import { Notice } from '@/app/_ui/primitives/notice';
import { useTokenAct } from './act';
import { revokeToken } from './actions';

/** Asked once more, because a script that still uses the token stops at once. */
export function RevokeButton({ id, name }: { readonly id: string; readonly name: string }) {
  const [open, setOpen] = useState(false);
  const act = useTokenAct(revokeToken, () => setOpen(false));
  return (
    <Dialog
      title={`Revoke ${name}?`}
      description="Whatever still uses it is refused from the next request on. Its line stays in this list."
      open={open}
      onOpenChange={setOpen}
      trigger={<Button size="low" aria-label={`Revoke ${name}`}>Revoke</Button>}
      actions={<><Button onClick={() => setOpen(false)}>Keep it</Button><Button tone="main" busy={act.busy ? 'Revoking it' : null} onClick={() => void act.run({ id })}>Revoke</Button></>}
    >
      {act.trouble && <Notice kind="stop" live="alert" word="Not done">{act.trouble}</Notice>}
    </Dialog>
  );
}
