'use client';
import { useFieldArray } from 'react-hook-form';
import { Button } from '@/app/_ui/primitives/button';
import { EmptyState } from '@/app/_ui/primitives/page-state';
import { say } from '@/app/_ui/primitives/toaster';
import type { VerdictWord } from '@/lib/pipeline/result';
import type { QuantityRow } from './quantity-row';
import { emptyClaim, type ClaimFields } from './claim-fields';
import { ClaimRow } from './claim-row';
import { moveInColumn } from './move-in-column';
import { PasteClaims } from './paste-part';
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
  const names = { waveforms: form.watch('waveforms').map((w) => w.name), noise: form.watch('noise').map((n) => n.name), series: [...new Set(form.watch('waveforms').map((w) => w.series.trim()).filter((s) => s !== ''))] };
  const fresh = (): ClaimFields => ({ ...emptyClaim(ids()), a: names.waveforms[0] ?? '', b: names.waveforms[1] ?? '', noise: names.noise[0] ?? '' });
  const remove = (index: number) => {
    const gone = form.getValues(`claims.${index}`);
    rows.remove(index);
    say(`Claim ${gone.id} is removed.`, () => rows.insert(index, gone));
  };
  const fill = (claims: readonly ClaimFields[]) => {
    const before = rows.fields.length;
    rows.append([...claims]);
    say(`${claims.length} ${claims.length === 1 ? 'claim is' : 'claims are'} filled in.`, () => rows.remove(claims.map((_, i) => before + i)));
  };
  return (
    <div className="grid gap-4">
      {rows.fields.length === 0 && <EmptyState level={3} title="No number is claimed yet">A claim is one number with its settings, or one number for each value of one setting.</EmptyState>}
      {rows.fields.length > 0 && (
        <div className="overflow-x-auto rounded border border-hair-2 bg-sheet px-4 py-2" tabIndex={0} role="group" aria-label="Claims, as cells">
          <table className="tbl min-w-[860px]" onKeyDown={moveInColumn}>
            <caption className="sr-only">Claims. Enter and the arrow keys up and down move through a column; beneath each row is what is declared for it.</caption>
            <colgroup><col className="w-[9%]" /><col className="w-[20%]" /><col className="w-[10%]" /><col className="w-[10%]" /><col className="w-[10%]" /><col className="w-[14%]" /><col className="w-[10%]" /><col /><col /></colgroup>
            <thead><tr>{['Claim', 'Quantity', 'Of', 'and', 'Noise', 'Claimed', 'Tolerance', 'Unit', 'Reads'].map((head) => <th key={head} scope="col">{head}</th>)}</tr></thead>
            {rows.fields.map((row, i) => (
              <ClaimRow key={row.key} form={form} index={i} catalogue={catalogue} names={names} verdicts={verdicts} onRemove={() => remove(i)} onDuplicate={() => rows.insert(i + 1, emptyClaim(ids(), form.getValues(`claims.${i}`)))} />
            ))}
          </table>
        </div>
      )}
      <div className="flex flex-wrap gap-2"><Button onClick={() => rows.append(fresh())}>Add a claim</Button></div>
      <PasteClaims room={{ catalogue, ...names }} taken={ids} like={fresh} onFill={fill} />
    </div>
  );
}
