'use client';
import { useState } from 'react';
import { useFieldArray } from 'react-hook-form';
import { Button } from '@/app/_ui/primitives/button';
import { TextareaField } from '@/app/_ui/primitives/control';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { EmptyState } from '@/app/_ui/primitives/page-state';
import { Notice } from '@/app/_ui/primitives/notice';
import { Table } from '@/app/_ui/primitives/table';
import { say } from '@/app/_ui/primitives/toaster';
import type { VerdictWord } from '@/lib/pipeline/result';
import type { QuantityRow } from './quantity-row';
import { emptyClaim, type ClaimFields } from './claim-fields';
import { ClaimRow } from './claim-row';
import { moveInColumn } from './move-in-column';
import { pasteClaims } from './paste-claims';
import type { ComposerForm } from './waveform-part';

interface ClaimsPartProps {
  readonly form: ComposerForm;
  readonly catalogue: readonly QuantityRow[];
  /** Of the latest check, by claim id. */
  readonly verdicts: readonly { readonly id: string; readonly verdict: VerdictWord }[];
}

/** One claimed number, or one swept line of them, a row. */
export function ClaimsPart({ form, catalogue, verdicts }: ClaimsPartProps) {
  const rows = useFieldArray({ control: form.control, name: 'claims', keyName: 'key' });
  const ids = () => form.getValues('claims').map((c) => c.id);
  const names = { waveforms: form.watch('waveforms').map((w) => w.name), noise: form.watch('noise').map((n) => n.name) };
  const fresh = (): ClaimFields => ({ ...emptyClaim(ids()), a: names.waveforms[0] ?? '', b: names.waveforms[1] ?? '', noise: names.noise[0] ?? '' });
  const remove = (index: number) => {
    const gone = form.getValues(`claims.${index}`);
    rows.remove(index);
    say(`Claim ${gone.id} is removed.`, () => rows.insert(index, gone));
  };
  return (
    <div className="grid gap-4">
      {rows.fields.length === 0 && <EmptyState level={3} title="No number is claimed yet">A claim is one number with its settings, or one number for each value of one setting.</EmptyState>}
      {rows.fields.length > 0 && (
        <div className="overflow-x-auto rounded border border-hair-2 bg-sheet px-4 py-2" tabIndex={0} role="group" aria-label="Claims, as cells">
          <table className="tbl min-w-[860px]" onKeyDown={moveInColumn}>
            <caption className="sr-only">Claims. Enter and the arrow keys up and down move through a column; beneath each row is what is declared for it.</caption>
            <colgroup><col className="w-[9%]" /><col className="w-[20%]" /><col className="w-[10%]" /><col className="w-[10%]" /><col className="w-[10%]" /><col className="w-[14%]" /><col className="w-[10%]" /><col /><col /></colgroup>
            <thead><tr>{['Claim', 'Quantity', 'Of a', 'and b', 'Noise', 'Claimed', 'Tolerance', 'Unit', 'Reads'].map((head) => <th key={head} scope="col">{head}</th>)}</tr></thead>
            {rows.fields.map((row, i) => (
              <ClaimRow key={row.key} form={form} index={i} catalogue={catalogue} names={names} verdicts={verdicts} onRemove={() => remove(i)} onDuplicate={() => rows.insert(i + 1, emptyClaim(ids(), form.getValues(`claims.${i}`)))} />
            ))}
          </table>
        </div>
      )}
      <div className="flex flex-wrap gap-2"><Button onClick={() => rows.append(fresh())}>Add a claim</Button></div>
      <PasteClaims catalogue={catalogue} taken={ids} like={fresh} onFill={(claims) => rows.append([...claims])} />
    </div>
  );
}

interface PasteProps {
  readonly catalogue: readonly QuantityRow[];
  readonly taken: () => readonly string[];
  readonly like: () => ClaimFields;
  readonly onFill: (claims: readonly ClaimFields[]) => void;
}

/** What will be filled in is shown before it is. */
function PasteClaims({ catalogue, taken, like, onFill }: PasteProps) {
  const [text, setText] = useState('');
  const settings = [...new Set(catalogue.flatMap((q) => q.settings.map((s) => s.name as string)))];
  const pasted = text.trim() === '' ? null : pasteClaims(text, taken(), settings, like());
  return (
    <Disclosure summary="Paste claims from a spreadsheet">
      <div className="grid gap-3">
        <TextareaField label="Table" value={text} spellCheck={false} onChange={(e) => setText(e.target.value)} placeholder={'quantity\ta\tb\tnoise\ttotalMassMsun\tclaimed\nmatch\tA\tB\tS\t60\t0.9185'} hint="The first line names the columns: id, quantity, a, b, noise, claimed, tolerance, or any setting." />
        {pasted && pasted.problems.length > 0 && <Notice kind="look">{pasted.problems.map((p) => <p key={p}>{p}</p>)}</Notice>}
        {pasted && pasted.claims.length > 0 && (
          <>
            <Table caption="What will be filled in">
              <thead><tr><th scope="col">Claim</th><th scope="col">Quantity</th><th scope="col">Of</th><th scope="col">Settings</th><th scope="col">Claimed</th></tr></thead>
              <tbody>{pasted.claims.map((c) => <tr key={c.id}><th scope="row">{c.id}</th><td>{c.quantity}</td><td>{[c.a, c.b].filter(Boolean).join(', ')}</td><td>{Object.entries(c.settings).map(([k, v]) => `${k} ${v}`).join(', ')}</td><td>{c.claimed}</td></tr>)}</tbody>
            </Table>
            <div><Button tone="main" onClick={() => { onFill(pasted.claims); setText(''); }}>Fill in {pasted.claims.length} {pasted.claims.length === 1 ? 'claim' : 'claims'}</Button></div>
          </>
        )}
      </div>
    </Disclosure>
  );
}

