'use client';
import type { ReactNode } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { Input, Select, SelectField, TextField } from '@/app/_ui/primitives/control';
import { VerdictChip } from '@/app/_ui/verdict/verdict-chip';
import type { VerdictWord } from '@/lib/pipeline/result';
import { readingOf } from './claimed-reading';
import { ClaimSettings } from './claim-settings';
import { errorAt } from './form-error';
import { isListField, type RoleField } from './claim-fields';
import { unitWith, type QuantityRow } from './quantity-row';
import { WaveformList } from './waveform-list';
import type { ComposerForm } from './waveform-part';

export interface ClaimRowProps {
  readonly form: ComposerForm;
  readonly index: number;
  readonly catalogue: readonly QuantityRow[];
  readonly names: { readonly waveforms: readonly string[]; readonly noise: readonly string[]; readonly series: readonly string[] };
  /** Of the latest check, by claim id. */
  readonly verdicts: readonly { readonly id: string; readonly verdict: VerdictWord }[];
  readonly onRemove: () => void;
  readonly onDuplicate: () => void;
}

/** A claim: a row of cells, and beneath it what is declared for it. */
export function ClaimRow(props: ClaimRowProps) {
  const { form, index, catalogue, names, verdicts } = props;
  const { register, watch } = form;
  const at = `claims.${index}` as const;
  const claim = watch(at);
  const quantity = catalogue.find((q) => q.id === claim.quantity);
  const verdict = verdicts.find((v) => v.id === claim.id)?.verdict;
  const unit = quantity ? unitWith(quantity, claim.settings) : '';
  const needsNoise = quantity?.needsNoise ?? true;
  // What the new quantity has no place for would only be refused by the check.
  const clearUnused = (chosen: string) => {
    const next = catalogue.find((q) => q.id === chosen);
    for (const role of everyField) if (next && !next.roles.includes(role)) form.setValue(`${at}.${role}`, isListField(role) ? [] : '', { shouldDirty: true });
    if (next && !next.needsNoise) form.setValue(`${at}.noise`, '', { shouldDirty: true });
  };
  // A role that an imported sheet names and the quantity does not take is shown, so that it can be emptied.
  const strays = everyField.filter((role) => claim[role].length > 0 && !(quantity?.roles ?? []).includes(role));
  const roles: readonly RoleField[] = [...(quantity?.roles ?? ['a']), ...strays];
  const id = claim.id || `claim ${index + 1}`;
  const problem = [errorAt(form, `${at}.id`), errorAt(form, `${at}.tolerance`)].filter(Boolean).join(' ');
  const notes = `claim-${index}-notes`;
  return (
    <tbody data-listed tabIndex={-1} aria-label={id}>
      <tr>
        <th scope="row"><Input dense aria-label={`Id of ${id}`} aria-invalid={errorAt(form, `${at}.id`) ? true : undefined} aria-describedby={notes} {...register(`${at}.id`)} /></th>
        <td>
          <Select dense aria-label={`Quantity of ${id}`} {...register(`${at}.quantity`, { onChange: (e: { target: { value: string } }) => clearUnused(e.target.value) })}>
            {!quantity && <option value={claim.quantity}>{claim.quantity || 'choose one'}</option>}
            {catalogue.map((q) => <option key={q.id} value={q.id}>{q.title}</option>)}
          </Select>
        </td>
        {[0, 1].map((cell) => <RoleCell key={cell} form={form} index={index} id={id} role={roles[cell]} names={names} />)}
        <Choice when={needsNoise || claim.noise !== ''} label={`Noise of ${id}`} options={names.noise}>{(shared) => <Select {...shared} {...register(`${at}.noise`)} />}</Choice>
        <td><Input dense aria-label={`Claimed value of ${id}${unit ? `, ${unit}` : ''}`} aria-describedby={notes} spellCheck={false} autoComplete="off" {...register(`${at}.claimed`)} /></td>
        <td><Input dense aria-label={`Tolerance of ${id}, ${quantity?.scale === 'ln' ? 'a fraction' : 'in the unit of the number'}`} placeholder="natural" aria-invalid={errorAt(form, `${at}.tolerance`) ? true : undefined} aria-describedby={notes} inputMode="decimal" {...register(`${at}.tolerance`)} /></td>
        <td className="whitespace-nowrap text-ink-2">{quantity?.scale === 'ln' && unit === '' ? 'T: fraction' : unit || '1'}</td>
        <td className="whitespace-nowrap">{verdict ? <VerdictChip state={verdict} bare /> : <span className="text-ink-2">not yet</span>}</td>
      </tr>
      <tr><td colSpan={9} className="pb-4"><Beneath {...props} quantity={quantity} problem={problem} notes={notes} /></td></tr>
    </tbody>
  );
}

const everyField: readonly RoleField[] = ['a', 'b', 'em', 'gw', 'series', 'signals', 'templates'];
const roleWords: Readonly<Record<RoleField, string>> = { a: 'Waveform a', b: 'Waveform b', em: 'Electromagnetic waveform', gw: 'Gravitational waveform', series: 'Series', signals: 'Signals', templates: 'Templates' };

interface RoleProps {
  readonly form: ComposerForm;
  readonly index: number;
  readonly id: string;
  readonly role: RoleField | undefined;
  readonly names: ClaimRowProps['names'];
}

/** One role of the claim: a choice, or how many are chosen beneath. */
function RoleCell({ form, index, id, role, names }: RoleProps) {
  if (role === undefined) return <td className="text-ink-2">none</td>;
  const at = `claims.${index}.${role}` as const;
  const label = `${roleWords[role]} of ${id}`;
  if (isListField(role)) return <td>{roleWords[role]}: {form.watch(`claims.${index}`)[role].length} chosen</td>;
  const chosen = form.watch(`claims.${index}`)[role];
  const known = role === 'series' ? names.series : names.waveforms;
  return <Choice when label={label} options={chosen === '' || known.includes(chosen) ? known : [...known, chosen]}>{(shared) => <Select {...shared} {...form.register(at)} />}</Choice>;
}

interface ChoiceProps {
  readonly when: boolean;
  readonly label: string;
  readonly options: readonly string[];
  readonly children: (shared: { readonly dense: true; readonly 'aria-label': string; readonly children: ReactNode }) => ReactNode;
}

function Choice({ when, label, options, children }: ChoiceProps) {
  if (!when) return <td className="text-ink-2">none</td>;
  return <td>{children({ dense: true, 'aria-label': label, children: <><option value="">choose</option>{options.map((n, i) => <option key={`${n}${i}`}>{n}</option>)}</> })}</td>;
}

function Beneath({ form, index, quantity, names, problem, notes, onDuplicate, onRemove }: ClaimRowProps & { readonly quantity: QuantityRow | undefined; readonly problem: string; readonly notes: string }) {
  const at = `claims.${index}` as const;
  const { id, claimed, overSetting, overValues } = form.watch(at);
  const sweep = overSetting !== '';
  return (
    <div className="grid gap-3 border-l-2 border-hair-2 pl-4">
      <p id={notes} className="text-small text-ink-2">{problem && <span className="text-differs">{problem} </span>}Claimed: {readingOf(claimed, sweep, overValues)}</p>
      {(quantity?.roles ?? []).filter(isListField).map((role) => <WaveformList key={role} form={form} index={index} role={role} label={`${roleWords[role]} of ${id}`} names={names.waveforms} />)}
      {quantity && <ClaimSettings form={form} index={index} quantity={quantity} />}
      <div className="grid items-start gap-3 sm:grid-cols-3 mid:grid-cols-4">
        <SelectField label="Over" {...form.register(`${at}.overSetting`)}><option value="">one number</option>{(quantity?.sweepable ?? []).map((s) => <option key={s}>{s}</option>)}</SelectField>
        {sweep && <TextField label={`Values of ${overSetting}`} hint="with ; between; as many claimed values, with ; between" {...form.register(`${at}.overValues`)} />}
        <div className="flex flex-wrap gap-2 self-end">
          <Button size="low" tone="quiet" aria-label={`Duplicate ${id}`} onClick={onDuplicate}>Duplicate</Button>
          <Button size="low" tone="quiet" aria-label={`Remove ${id}`} onClick={onRemove}>Remove</Button>
        </div>
      </div>
    </div>
  );
}
