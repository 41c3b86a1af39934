'use client';
import { useFieldArray } from 'react-hook-form';
import { Button } from '@/app/_ui/primitives/button';
import { SelectField, TextField } from '@/app/_ui/primitives/control';
import { Segmented } from '@/app/_ui/primitives/segmented';
import { say } from '@/app/_ui/primitives/toaster';
import { builtInCurves } from '@/lib/engine/noise/built-in-curves';
import { emptyNoise } from './fields';
import { FileOptions } from './file-options';
import { errorAt } from './form-error';
import { GuessList, type GuessDesk } from './guess-list';
import type { ComposerForm } from './waveform-part';

export function NoisePart({ form, files, desk }: { readonly form: ComposerForm; readonly files: readonly string[]; readonly desk: GuessDesk }) {
  const rows = useFieldArray({ control: form.control, name: 'noise', keyName: 'key' });
  const free = () => files.find((f) => !form.getValues('waveforms').some((w) => w.file === f) && !form.getValues('noise').some((n) => n.file === f)) ?? '';
  const name = () => ['S', 'S2', 'S3', 'S4'].find((n) => !form.getValues('noise').some((r) => r.name === n)) ?? `S${form.getValues('noise').length + 1}`;
  const remove = (index: number) => {
    const gone = form.getValues(`noise.${index}`);
    rows.remove(index);
    say(`Noise curve ${gone.name} is removed.`, () => rows.insert(index, gone));
  };
  return (
    <div className="grid gap-4">
      {rows.fields.length === 0 && <p className="text-ui text-ink-2">Matches and loudness need a noise curve; radiated energy needs none.</p>}
      {rows.fields.map((row, i) => <NoiseRow key={row.key} form={form} index={i} files={files} desk={desk} onRemove={() => remove(i)} />)}
      <div className="flex flex-wrap gap-2">
        <Button onClick={() => rows.append(emptyNoise(name(), free() || files[0] || ''))} aria-disabled={files.length === 0 || undefined}>Declare a file as noise curve</Button>
        <Button onClick={() => rows.append(emptyNoise(name()))}>Use a built-in curve</Button>
      </div>
    </div>
  );
}

function NoiseRow({ form, index, files, desk, onRemove }: { readonly form: ComposerForm; readonly index: number; readonly files: readonly string[]; readonly desk: GuessDesk; readonly onRemove: () => void }) {
  const { register, watch, setValue } = form;
  const at = `noise.${index}` as const;
  const { kind, curve, name, file } = watch(at);
  const built = builtInCurves.find((c) => c.id === curve);
  return (
    <fieldset className="grid gap-3 rounded border border-hair-2 bg-sheet px-4 py-3">
      <legend className="px-1 text-small font-semibold">Noise curve {name}</legend>
      <Segmented legend="From" name={`noise-kind-${index}`} value={kind} options={[{ value: 'file', label: 'a file' }, { value: 'curve', label: 'a built-in curve' }]} onChange={(k) => setValue(`${at}.kind`, k, { shouldDirty: true })} />
      <div className="grid gap-3 sm:grid-cols-[110px_minmax(0,1fr)_minmax(0,1fr)_minmax(0,1fr)]">
        <TextField label="Name" error={errorAt(form, `${at}.name`)} {...register(`${at}.name`)} />
        {kind === 'file' ? (
          <>
            <SelectField label="File" {...register(`${at}.file`)}><FileOptions files={files} chosen={file} /></SelectField>
            <TextField label="Columns, in order" list="noise-layouts" spellCheck={false} hint="asd in Hz^−½, psd in Hz⁻¹, or characteristic" {...register(`${at}.columns`)} />
            <SelectField label="Sided" {...register(`${at}.sided`)}><option value="">assumed: one</option><option>one</option><option>two</option></SelectField>
          </>
        ) : (
          <SelectField label="Curve" fieldClassName="sm:col-span-2" {...register(`${at}.curve`)}>{builtInCurves.map((c) => <option key={c.id} value={c.id}>{c.id}: {c.title}</option>)}</SelectField>
        )}
      </div>
      <datalist id="noise-layouts"><option value="f asd" /><option value="f psd" /><option value="f characteristic" /></datalist>
      {kind === 'curve' && built && <p className="text-small text-ink-2">{built.source}. Known from {built.fLowHz} to {built.fHighHz} Hz; nothing is extrapolated.</p>}
      {kind === 'file' && <GuessList part="noise" name={name.trim()} desk={desk} />}
      <div><Button size="low" tone="quiet" onClick={onRemove}>Remove this curve</Button></div>
    </fieldset>
  );
}
