'use client';
import { SettingReadingsList } from '@/app/_ui/claim/setting-readings';
import { SelectField, TextField } from '@/app/_ui/primitives/control';
import type { SettingRow } from '@/lib/engine/quantities/settings-table';
import { settingsWith, type QuantityRow } from './quantity-row';
import { SettingControl } from './setting-control';
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

function SettingField({ form, index, row }: { readonly form: ComposerForm; readonly index: number; readonly row: SettingRow }) {
  return <SettingControl row={row} undeclared={`assumed: ${row.houseDefault}`} {...form.register(`claims.${index}.settings.${row.name}`)} />;
}
