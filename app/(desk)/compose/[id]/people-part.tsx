'use client';
import { useState } from 'react';
import { OrcidLine } from '@/app/_ui/claim/orcid-line';
import { Button } from '@/app/_ui/primitives/button';
import { TextField } from '@/app/_ui/primitives/control';
import { Table } from '@/app/_ui/primitives/table';
import { say } from '@/app/_ui/primitives/toaster';
import type { AuthorView } from '@/lib/services/submissions/submission-view';
import { ActButton, Trouble } from '../../act-parts';
import { useAct } from '../../use-act';
import { addCoAuthor, confirmAuthorship, removeCoAuthor, restoreCoAuthor } from '../actions';

interface PeopleProps {
  readonly id: string;
  readonly authors: readonly AuthorView[];
  readonly you: string;
}

/** Authors and whether each has said so; only the first of them names others. */
export function PeoplePart({ id, authors, you }: PeopleProps) {
  const mine = authors.find((a) => a.userId === you);
  const mayManage = mine?.role === 'author';
  return (
    <div className="grid gap-4">
      <Table caption="Authors">
        <thead><tr><th scope="col">Name</th><th scope="col">Part</th><th scope="col">Authorship and release of the data</th><th scope="col"><span className="sr-only">Next step</span></th></tr></thead>
        <tbody>
          {authors.map((author) => (
            <tr key={author.userId ?? author.name}>
              <th scope="row">{author.name}{author.affiliation && <span className="block text-small font-normal text-ink-2">{author.affiliation}</span>}{author.orcid && <span className="block font-normal"><OrcidLine orcid={author.orcid.id} authenticated={author.orcid.authenticated} /></span>}</th>
              <td>{author.role}</td>
              <td>{author.confirmed ? 'confirmed' : 'not confirmed yet'}</td>
              <td className="text-right">
                {author === mine && !author.confirmed && <ActButton act={confirmAuthorship} input={{ id }} busy="Confirming" size="low" tone="main">Confirm mine</ActButton>}
                {mayManage && author.role === 'co-author' && author.userId && <TakeOff id={id} userId={author.userId} name={author.name} />}
              </td>
            </tr>
          ))}
        </tbody>
      </Table>
      {mayManage && <NameCoAuthor id={id} />}
    </div>
  );
}

function NameCoAuthor({ id }: { readonly id: string }) {
  const [email, setEmail] = useState('');
  const adding = useAct(addCoAuthor, () => setEmail(''));
  return (
    <form className="grid gap-2 sm:grid-cols-[minmax(0,320px)_auto] sm:items-end" onSubmit={(e) => { e.preventDefault(); void adding.run({ id, email }); }}>
      <TextField label="Co-author’s e-mail address" type="email" required value={email} onChange={(e) => setEmail(e.target.value)} />
      <div><Button type="submit" busy={adding.busy ? 'Naming' : null}>Name a co-author</Button></div>
      <div className="sm:col-span-2"><Trouble trouble={adding.trouble} /></div>
    </form>
  );
}

/** With the way back: place and confirmation are as they were. */
function TakeOff({ id, userId, name }: { readonly id: string; readonly userId: string; readonly name: string }) {
  const restoring = useAct(restoreCoAuthor, () => say(`${name} is back.`));
  const removing = useAct(removeCoAuthor, () => say(`${name} is taken off.`, () => void restoring.run({ id, userId })));
  return (
    <span className="inline-grid gap-2">
      <Button size="low" tone="quiet" aria-label={`Take off ${name}`} busy={removing.busy ? 'Removing' : null} onClick={() => void removing.run({ id, userId })}>Take off</Button>
      <Trouble trouble={removing.trouble ?? restoring.trouble} />
    </span>
  );
}
