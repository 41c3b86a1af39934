'use client';
import { useState, type FormEvent } from 'react';
import { Trouble } from '@/app/(desk)/act-parts';
import { useAct } from '@/app/(desk)/use-act';
import { Button } from '@/app/_ui/primitives/button';
import { TextField } from '@/app/_ui/primitives/control';
import { Notice } from '@/app/_ui/primitives/notice';
import { giveAddress } from '../actions';

interface AddressFormProps {
  readonly name: string;
  /** To where a letter is on its way already. */
  readonly asked: string | null;
}

export function AddressForm({ name, asked }: AddressFormProps) {
  const [sentTo, setSentTo] = useState(asked);
  const giving = useAct(giveAddress);
  const send = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const email = String(form.get('email') ?? '');
    if (await giving.run({ name: String(form.get('name') ?? ''), email })) setSentTo(email);
  };
  return (
    <form method="post" onSubmit={(event) => void send(event)} className="grid gap-4">
      {sentTo && <Notice kind="note" word="Sent" live="status">A letter is on its way to {sentTo}. Its link works for a day. If that address has an account already, the letter says what to do instead.</Notice>}
      <TextField label="Name" name="name" autoComplete="name" required maxLength={120} defaultValue={name} hint="As it should stand on a record." />
      <TextField label="E-mail" name="email" type="email" autoComplete="email" required maxLength={254} defaultValue={asked ?? ''} />
      <Trouble trouble={giving.trouble} />
      <Button type="submit" tone="main" busy={giving.busy ? 'Sending' : null} className="w-full">{sentTo ? 'Send another letter' : 'Send the letter'}</Button>
    </form>
  );
}
