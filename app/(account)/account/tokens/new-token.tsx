'use client';
import { useState, type FormEvent } from 'react';
import type { TokenScope } from '@/lib/policy/token-scopes';
import type { MadeToken } from '@/lib/services/tokens/token-view';
import { Button } from '@/app/_ui/primitives/button';
import { Checkbox, SelectField, TextField } from '@/app/_ui/primitives/control';
import { Notice } from '@/app/_ui/primitives/notice';
import { useTokenAct } from './act';
import { createToken } from './actions';
import { MadeOnce } from './made-once';

interface NewTokenProps {
  readonly scopes: readonly { readonly scope: TokenScope; readonly meaning: string }[];
  readonly days: readonly (7 | 30 | 90 | 365)[];
}

export function NewToken({ scopes, days }: NewTokenProps) {
  const [made, setMade] = useState<MadeToken | null>(null);
  const act = useTokenAct(createToken, setMade);
  const send = (event: FormEvent<HTMLFormElement>): void => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const chosen = days.find((d) => String(d) === form.get('days')) ?? 90;
    void act.run({ name: String(form.get('name') ?? ''), days: chosen, scopes: form.getAll('scopes') as TokenScope[] });
  };
  if (made) return <MadeOnce made={made} another={() => setMade(null)} />;
  return (
    <section aria-labelledby="new-h" className="rounded border border-hair-2 bg-sheet px-5 py-4">
      <h2 id="new-h" className="mb-3 text-h3">Make a token</h2>
      <form method="post" onSubmit={send} className="grid gap-4">
        <div className="grid gap-4 sm:grid-cols-[minmax(0,1fr)_180px]">
          <TextField label="Name" name="name" required maxLength={60} autoComplete="off" hint="What will use it, such as: nightly check on the cluster." />
          <SelectField label="Expires after" name="days" defaultValue="90">{days.map((d) => <option key={d} value={d}>{d} days</option>)}</SelectField>
        </div>
        <fieldset>
          <legend className="text-small font-semibold">Scopes</legend>
          <div className="mt-1 grid gap-x-6 sm:grid-cols-2">
            {scopes.map(({ scope, meaning }) => <Checkbox key={scope} name="scopes" value={scope} defaultChecked={scope === 'read'} label={<><b className="font-semibold">{scope}</b>: {meaning}</>} />)}
          </div>
        </fieldset>
        {act.trouble && <Notice kind="stop" live="alert" word="Not yet">{act.trouble}</Notice>}
        <div><Button type="submit" tone="main" busy={act.busy ? 'Making it' : null}>Make the token</Button></div>
      </form>
    </section>
  );
}
