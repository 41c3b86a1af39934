'use client';
import { useState, type FormEvent } from 'react';
import { Trouble } from '@/app/(desk)/act-parts';
import { useAct } from '@/app/(desk)/use-act';
import { Button } from '@/app/_ui/primitives/button';
import { Checkbox } from '@/app/_ui/primitives/control';
import type { OptionalLetter } from '@/lib/reviews/optional-letters';
import { chooseLetters } from './actions';

const NEEDED = ['An invitation to referee', 'The decision on a submission of yours', 'What concerns your address, password and sign-in'] as const;
const OPTIONAL: readonly (readonly [OptionalLetter, string])[] = [
  ['reminder', 'A reminder of an answer or a report that you owe'],
  ['report-received', 'A report on a submission that you edit has come in'],
];

/** Letters that one's part cannot do without are listed too, as ticked and fixed, so that nobody looks for them. */
export function LettersForm({ declined }: { readonly declined: readonly OptionalLetter[] }) {
  const [saved, setSaved] = useState(false);
  const saving = useAct(chooseLetters, () => setSaved(true));
  const send = (event: FormEvent<HTMLFormElement>): void => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    void saving.run({ reminder: form.has('reminder'), 'report-received': form.has('report-received') });
  };
  return (
    <form method="post" onSubmit={send} onChange={() => setSaved(false)} className="grid gap-4">
      <fieldset>
        <legend className="text-small font-semibold">Always sent: without them you could not do your part</legend>
        {NEEDED.map((label) => <Checkbox key={label} label={label} checked disabled readOnly />)}
      </fieldset>
      <fieldset>
        <legend className="text-small font-semibold">As you like</legend>
        {OPTIONAL.map(([letter, label]) => <Checkbox key={letter} name={letter} label={label} defaultChecked={!declined.includes(letter)} />)}
      </fieldset>
      <Trouble trouble={saving.trouble} />
      <div className="flex flex-wrap items-center gap-3">
        <Button type="submit" busy={saving.busy ? 'Saving' : null}>Save the choice</Button>
        <span role="status" className="text-ui text-ink-2">{saved ? 'Saved.' : ''}</span>
      </div>
    </form>
  );
}
