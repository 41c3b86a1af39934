'use client';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { TextareaField } from '@/app/_ui/primitives/control';
import { Dialog, DialogClose } from '@/app/_ui/primitives/dialog';
import { Trouble } from '../../act-parts';
import { withdraw } from '../../compose/actions';
import { useAct } from '../../use-act';

/** Asks for the reason first: it is kept with the submission. */
export function Withdraw({ id }: { readonly id: string }) {
  const [reason, setReason] = useState('');
  const [open, setOpen] = useState(false);
  const act = useAct(withdraw, () => setOpen(false));
  return (
    <Dialog
      title="Withdraw this submission"
      description="It goes to no referee any more. Nothing is erased, and it cannot be taken up again."
      open={open}
      onOpenChange={setOpen}
      trigger={<Button tone="quiet">Withdraw</Button>}
      actions={<><DialogClose>Keep it</DialogClose><Button tone="main" busy={act.busy ? 'Withdrawing' : null} onClick={() => void act.run({ id, reason })}>Withdraw</Button></>}
    >
      <div className="grid gap-3">
        <TextareaField label="Reason" required maxLength={2000} value={reason} onChange={(e) => setReason(e.target.value)} hint="A sentence; the editor reads it." />
        <Trouble trouble={act.trouble} />
      </div>
    </Dialog>
  );
}
