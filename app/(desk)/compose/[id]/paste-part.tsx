'use client';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { TextareaField } from '@/app/_ui/primitives/control';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { Notice } from '@/app/_ui/primitives/notice';
import { Segmented } from '@/app/_ui/primitives/segmented';
import { Table } from '@/app/_ui/primitives/table';
import { asSweep, cellProblems, type CellProblems, type PasteRoom } from './check-pasted';
import type { ClaimFields } from './claim-fields';
import { pasteClaims } from './paste-claims';

interface PasteProps {
  readonly room: PasteRoom;
  readonly taken: () => readonly string[];
  readonly like: () => ClaimFields;
  readonly onFill: (claims: readonly ClaimFields[]) => void;
}

/** What will be filled in is shown before it is, each cell with what is wrong with it. */
export function PasteClaims({ room, taken, like, onFill }: PasteProps) {
  const [text, setText] = useState('');
  const [together, setTogether] = useState<'rows' | 'sweep'>('sweep');
  const settings = [...new Set(room.catalogue.flatMap((q) => q.settings.map((s) => s.name as string)))];
  const pasted = text.trim() === '' ? null : pasteClaims(text, taken(), settings, like());
  const sweep = pasted && asSweep(pasted.claims, room.catalogue);
  const claims = sweep && together === 'sweep' ? [sweep] : (pasted?.claims ?? []);
  const problems = claims.map((claim) => cellProblems(claim, room));
  const faulty = problems.reduce((sum, one) => sum + Object.keys(one).length, 0);
  return (
    <Disclosure summary="Paste claims from a spreadsheet">
      <div className="grid gap-3">
        <TextareaField label="Table" value={text} spellCheck={false} onChange={(e) => setText(e.target.value)} placeholder={'quantity\ta\tb\tnoise\ttotalMassMsun\tclaimed\nmatch\tA\tB\tS\t60\t0.9185(2)'} hint="With tabs, commas or semicolons between the cells. The first line names the columns: id, quantity, a, b, noise, claimed, tolerance, or any setting." />
        {pasted && pasted.problems.length > 0 && <Notice kind="look">{pasted.problems.map((p) => <p key={p}>{p}</p>)}</Notice>}
        {sweep && <Segmented legend="The rows are" name="paste-as" value={together} options={[{ value: 'sweep', label: `one claim over ${sweep.overSetting}` }, { value: 'rows', label: 'one claim each' }]} onChange={setTogether} />}
        {claims.length > 0 && (
          <>
            <Table caption="What will be filled in">
              <thead><tr>{['Claim', 'Quantity', 'Of a', 'and b', 'Noise', 'Settings', 'Claimed', 'Tolerance'].map((head) => <th key={head} scope="col">{head}</th>)}</tr></thead>
              <tbody>{claims.map((claim, i) => <PastedRow key={claim.id} claim={claim} problems={problems[i] ?? {}} />)}</tbody>
            </Table>
            {faulty > 0 && <p role="status" className="text-ui text-differs">{faulty} {faulty === 1 ? 'cell needs' : 'cells need'} mending. They may be filled in as they are and mended in the form.</p>}
            <div><Button tone="main" onClick={() => { onFill(claims); setText(''); }}>Fill in {claims.length} {claims.length === 1 ? 'claim' : 'claims'}</Button></div>
          </>
        )}
      </div>
    </Disclosure>
  );
}

function PastedRow({ claim, problems }: { readonly claim: ClaimFields; readonly problems: CellProblems }) {
  const settings = [...Object.entries(claim.settings), ...(claim.overSetting ? [[claim.overSetting, claim.overValues] as const] : [])];
  const column = (name: string, shown: string) => <td><Cell shown={shown} problem={problems[name]} /></td>;
  return (
    <tr className="align-top">
      <th scope="row">{claim.id}</th>
      {column('quantity', claim.quantity)}{column('a', claim.a || claim.em || claim.series)}{column('b', claim.b || claim.gw)}{column('noise', claim.noise)}
      <td>{settings.map(([name, value]) => <Cell key={name} shown={`${name} ${value}`} problem={problems[name]} />)}</td>
      {column('claimed', claim.claimed)}{column('tolerance', claim.tolerance)}
    </tr>
  );
}

const Cell = ({ shown, problem }: { readonly shown: string; readonly problem: string | undefined }) => (
  <span className="block">{shown || <span className="text-ink-2">none</span>}{problem && <span className="edge edge-stop block pl-2 text-small text-differs">{problem}</span>}</span>
);
