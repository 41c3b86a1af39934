'use client';
import { SettingReadingsList } from '@/app/_ui/claim/setting-readings';
import { SelectField, TextField } from '@/app/_ui/primitives/control';
import type { SettingRow } from '@/lib/engine/quantities/settings-table';
import { settingsWith, type QuantityRow } from './quantity-row';
import type { ComposerForm } from './waveform-part';

interface SettingsProps {
  readonly form: ComposerForm;
  readonly index: number;
  readonly quantity: QuantityRow;
}

/** The settings most claims name come first; the rest is a choice away. */
const often = ['observable', 'method', 'fit', 'fieldGauss', 'joinHz', 'weight', 'totalMassMsun', 'distanceMpc', 'fLowHz', 'fHighHz', 'startM', 'normaliseBy', 'includeEnergyBeforeStart', 'parameters'];

export function ClaimSettings({ form, index, quantity }: SettingsProps) {
  const at = `claims.${index}` as const;
  const { settings, overSetting } = form.watch(at);
  const meant = settingsWith(quantity, settings);
  const shown = meant.filter((s) => s.name !== overSetting && (often.includes(s.name) || settings[s.name] !== undefined));
  const others = meant.filter((s) => s.name !== overSetting && !shown.includes(s));
  const stray = Object.keys(settings).filter((name) => (settings[name] ?? '') !== '' && !meant.some((s) => s.name === name));
  const readings = quantity.readings.filter(({ setting }) => meant.some(({ name }) => name === setting));
  return (
    <div className="grid gap-3 sm:grid-cols-3 mid:grid-cols-4">
      {shown.map((s) => <SettingField key={s.name} form={form} index={index} row={s} />)}
      {stray.map((name) => <TextField key={name} label={`${name}: no setting of this claim`} error="Empty this box, or choose another quantity or observable." {...form.register(`${at}.settings.${name}`)} />)}
      {others.length > 0 && (
        <SelectField label="Declare another setting" value="" onChange={(e) => form.setValue(`${at}.settings.${e.target.value}`, '', { shouldDirty: true })}>
          <option value="">choose one</option>
          {others.map((s) => <option key={s.name} value={s.name}>{s.name}</option>)}
        </SelectField>
      )}
      <SettingReadingsList summary="What else can be meant by these settings" readings={readings} className="col-span-full" />
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
  if (shape.kind === 'place') return `${shape.options.join(', ')}, or for example ${shape.flags?.[0] ? `{"${shape.flags[0]}":true}` : `{"${shape.numbers[0]?.name ?? 'timeM'}":0.3}`}`;
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
