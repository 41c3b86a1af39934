'use client';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { Notice } from '@/app/_ui/primitives/notice';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';
import { differences } from './differences';
import { sheetFromFields, type ComposerFields } from './fields';
import { fetchTheirs } from './save-draft';

interface ConflictProps {
  readonly id: string;
  readonly why: string;
  readonly mine: () => ComposerFields;
  readonly onKeep: (version: number) => void;
  readonly onTake: (version: number, sheet: DraftSheet) => void;
}

type Theirs = { readonly version: number; readonly sheet: DraftSheet };

/** Two versions of one draft, side by side where they differ; one click takes either whole. */
export function ConflictView({ id, why, mine, onKeep, onTake }: ConflictProps) {
  const [theirs, setTheirs] = useState<Theirs | null>(null);
  const [gone, setGone] = useState(false);
  const compare = () => void fetchTheirs(id).then((found) => { setTheirs(found); setGone(found === null); });
  if (!theirs)
    return (
      <Notice kind="stop" live="alert" word="Two versions" actions={<Button size="low" tone="main" onClick={compare}>Compare both</Button>}>
        <p>{why}</p>
        <p>What you wrote is kept in this browser. Nothing is overwritten until you choose.</p>
        {gone && <p>The other version could not be read. Try again when you are online.</p>}
      </Notice>
    );
  const fields = mine();
  const rows = differences({ ...sheetFromFields(fields), title: fields.title, statement: fields.statement }, theirs.sheet);
  return (
    <section aria-labelledby="two-h" className="grid gap-3 rounded border border-differs bg-sheet px-4 py-3">
      <h2 id="two-h" className="text-h3">Two versions of this draft</h2>
      {rows.length === 0 && <p className="text-ui">They say the same. Either may be kept.</p>}
      <div className="overflow-x-auto" tabIndex={0} role="group" aria-label="Where the two versions differ">
        <table className="tbl">
          <caption className="sr-only">Where the two versions differ</caption>
          <thead><tr><th scope="col">Part</th><th scope="col">Yours, in this browser</th><th scope="col">Theirs, saved as version {theirs.version}</th></tr></thead>
          <tbody>
            {rows.map((row) => (
              <tr key={row.part} className="align-top">
                <th scope="row">{row.part}</th>
                <td><pre className="font-code text-code whitespace-pre-wrap [overflow-wrap:anywhere]">{row.mine ?? 'not there'}</pre></td>
                <td><pre className="font-code text-code whitespace-pre-wrap [overflow-wrap:anywhere]">{row.theirs ?? 'not there'}</pre></td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <div className="flex flex-wrap gap-2">
        <Button tone="main" onClick={() => onKeep(theirs.version)}>Keep mine</Button>
        <Button onClick={() => onTake(theirs.version, theirs.sheet)}>Take theirs</Button>
      </div>
    </section>
  );
}
