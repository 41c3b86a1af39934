'use client';
import { Button } from '@/app/_ui/primitives/button';
import { SelectField, TextField } from '@/app/_ui/primitives/control';
import { parseClaimed } from '@/lib/claims/claimed';
import type { SettingRow } from '@/lib/engine/quantities/settings-table';
import type { QuantityRow } from './quantity-row';
import { claimedFrom } from './claim-fields';
import { errorAt } from './form-error';
import type { ComposerForm } from './waveform-part';

interface ClaimRowProps {
  readonly form: ComposerForm;
  readonly index: number;
  readonly catalogue: readonly QuantityRow[];
  readonly names: { readonly waveforms: readonly string[]; readonly noise: readonly string[] };
  readonly onRemove: () => void;
  readonly onDuplicate: () => void;
}

export function ClaimRow({ form, index, catalogue, names, onRemove, onDuplicate }: ClaimRowProps) {
  const { register, watch } = form;
  const at = `claims.${index}` as const;
  const claim = watch(at);
  const quantity = catalogue.find((q) => q.id === claim.quantity);
  return (
    <fieldset id={`claim-${claim.id}`} className="grid gap-3 rounded border border-hair-2 bg-sheet px-4 py-3">
      <legend className="px-1 text-small font-semibold">Claim {claim.id}</legend>
      <div className="grid gap-3 sm:grid-cols-[90px_minmax(0,2fr)_minmax(0,1fr)_minmax(0,1fr)_minmax(0,1fr)]">
        <TextField label="Id" error={errorAt(form, `${at}.id`)} {...register(`${at}.id`)} />
        <SelectField label="Quantity" {...register(`${at}.quantity`)}>
          {!quantity && <option value={claim.quantity}>{claim.quantity || 'choose one'}</option>}
          {catalogue.map((q) => <option key={q.id} value={q.id}>{q.title}</option>)}
        </SelectField>
        {(quantity?.roles ?? ['a']).map((role) => (
          <SelectField key={role} label={role === 'a' ? 'Of waveform a' : 'against b'} {...register(`${at}.${role}`)}><option value="">choose</option>{names.waveforms.map((n) => <option key={n}>{n}</option>)}</SelectField>
        ))}
        {quantity?.needsNoise !== false && <SelectField label="Noise" {...register(`${at}.noise`)}><option value="">choose</option>{names.noise.map((n) => <option key={n}>{n}</option>)}</SelectField>}
      </div>
      {quantity && <Settings form={form} index={index} quantity={quantity} />}
      <Values form={form} index={index} quantity={quantity} />
      <div className="flex flex-wrap gap-2">
        <Button size="low" tone="quiet" onClick={onDuplicate}>Duplicate</Button>
        <Button size="low" tone="quiet" onClick={onRemove}>Remove this claim</Button>
      </div>
    </fieldset>
  );
}

/** The settings most claims name come first; the rest is a choice away. */
const often = ['totalMassMsun', 'distanceMpc', 'fLowHz', 'fHighHz', 'startM', 'normaliseBy', 'includeEnergyBeforeStart', 'parameters'];

function Settings({ form, index, quantity }: { readonly form: ComposerForm; readonly index: number; readonly quantity: QuantityRow }) {
  const at = `claims.${index}` as const;
  const { settings, overSetting } = form.watch(at);
  const shown = quantity.settings.filter((s) => s.name !== overSetting && (often.includes(s.name) || settings[s.name] !== undefined));
  const others = quantity.settings.filter((s) => s.name !== overSetting && !shown.includes(s));
  const stray = Object.keys(settings).filter((name) => (settings[name] ?? '') !== '' && !quantity.settings.some((s) => s.name === name));
  return (
    <div className="grid gap-3 sm:grid-cols-3 mid:grid-cols-4">
      {shown.map((s) => <SettingField key={s.name} form={form} index={index} row={s} />)}
      {stray.map((name) => <TextField key={name} label={`${name}: no setting of this quantity`} error="Empty this box, or choose another quantity." {...form.register(`${at}.settings.${name}`)} />)}
      {others.length > 0 && (
        <SelectField label="Declare another setting" value="" onChange={(e) => form.setValue(`${at}.settings.${e.target.value}`, '', { shouldDirty: true })}>
          <option value="">choose one</option>
          {others.map((s) => <option key={s.name} value={s.name}>{s.name}</option>)}
        </SelectField>
      )}
    </div>
  );
}

function rangeOf({ shape, unit }: SettingRow): string {
  if (shape.kind === 'number' && shape.min !== undefined) return `${shape.min} to ${shape.max} ${unit}`.trim();
  if (shape.kind === 'number' && shape.above !== undefined) return `above ${shape.above} ${unit}`.trim();
  if (shape.kind === 'integer') return `whole number, ${shape.min} to ${shape.max}`;
  if (shape.kind === 'modes') return 'for example [[2,2],[2,-2]]';
  if (shape.kind === 'cosmology') return 'for example {"h0":67.4,"omegaM":0.315}';
  if (shape.kind === 'interval') return `[from, to] ${unit}`.trim();
  if (shape.kind === 'subset') return shape.options.join(', ');
  return '';
}

function SettingField({ form, index, row }: { readonly form: ComposerForm; readonly index: number; readonly row: SettingRow }) {
  const field = form.register(`claims.${index}.settings.${row.name}`);
  const label = <><span className="font-semibold">{row.name}</span>{row.unit && <span className="font-normal text-ink-2">, {row.unit}</span>}</>;
  const assumed = `assumed: ${row.houseDefault}`;
  if (row.shape.kind === 'choice')
    return <SelectField label={label} hint={row.meaning} {...field}><option value="">{assumed}</option>{row.shape.options.map((o) => <option key={String(o)}>{String(o)}</option>)}</SelectField>;
  return <TextField label={label} placeholder={assumed} hint={[row.meaning, rangeOf(row)].filter(Boolean).join(' ')} spellCheck={false} {...field} />;
}

function Values({ form, index, quantity }: { readonly form: ComposerForm; readonly index: number; readonly quantity: QuantityRow | undefined }) {
  const { register, watch } = form;
  const at = `claims.${index}` as const;
  const { claimed, overSetting, overValues } = watch(at);
  const sweep = overSetting !== '';
  return (
    <div className="grid gap-3 sm:grid-cols-4">
      <SelectField label="Over" {...register(`${at}.overSetting`)}><option value="">one number</option>{(quantity?.sweepable ?? []).map((s) => <option key={s}>{s}</option>)}</SelectField>
      {sweep && <TextField label={`Values of ${overSetting}`} hint="with ; between" {...register(`${at}.overValues`)} />}
      <TextField label={`Claimed${quantity?.unit ? `, ${quantity.unit}` : ''}`} hint={readingOf(claimed, sweep, overValues)} spellCheck={false} {...register(`${at}.claimed`)} />
      <TextField label="Tolerance" placeholder="natural" error={errorAt(form, `${at}.tolerance`)} hint={quantity?.scale === 'ln' ? 'a fraction: 0.05 is 5 %' : 'in the unit of the number'} inputMode="decimal" {...register(`${at}.tolerance`)} />
    </div>
  );
}

/** How the server will read what is typed, while it is typed. */
export function readingOf(typed: string, sweep: boolean, overValues: string): string {
  const parts = sweep ? typed.split(';').map((p) => p.trim()).filter(Boolean) : [typed];
  if (typed.trim() === '') return 'as printed, for example 0.9984(3); > 0.99 for a bound; = 0.9984 for an exact number';
  const wanted = overValues.split(';').filter((v) => v.trim()).length;
  const oneBound = parts.length === 1 && /^[<>]/.test(typed.trim());
  if (sweep && parts.length !== wanted && !oneBound) return `${parts.length} values for ${wanted} places: give one for each, with ; between`;
  return parts.map((part) => oneReading(part)).join('; ');
}

function oneReading(part: string): string {
  const read = parseClaimed(claimedFrom(part));
  if (!read.ok) return `${part}: ${read.error.expected}`;
  const c = read.value;
  if (c.kind !== 'value') return `${c.kind} ${c.bound}`;
  const digits = c.digits === null ? 'exact' : `last digit 10^${-c.digits}`.replace('^-', '⁻');
  return `${c.value}${c.uncertainty === null ? '' : ` ± ${c.uncertainty}`}, ${digits}`;
}
