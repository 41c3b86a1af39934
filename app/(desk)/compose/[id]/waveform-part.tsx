'use client';
import type { UseFormReturn } from 'react-hook-form';
import { useFieldArray } from 'react-hook-form';
import { Button } from '@/app/_ui/primitives/button';
import { SelectField, TextField } from '@/app/_ui/primitives/control';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { EmptyState } from '@/app/_ui/primitives/page-state';
import { say } from '@/app/_ui/primitives/toaster';
import type { FileView } from '@/lib/services/submissions/submission-view';
import { hasDatasets, noMapping, withMapping } from './array-mapping';
import { ArrayPart } from './array-part';
import { emptyWaveform, usualColumns, type ComposerFields } from './fields';
import { FileOptions } from './file-options';
import { errorAt } from './form-error';
import { GuessList, type GuessDesk } from './guess-list';

export type ComposerForm = UseFormReturn<ComposerFields>;

/** What stands when nothing is chosen, said in the box itself: `assumed: M`. */
interface Choice {
  readonly field: 'domain' | 'variable' | 'timeUnit' | 'amplitudeUnit' | 'polarisation' | 'negativeM';
  readonly label: string;
  readonly assumed: string;
  readonly options: readonly string[];
  /** What an option means, where its word of the format does not say it. */
  readonly words?: Readonly<Record<string, string>>;
}
const choices: readonly Choice[] = [
  { field: 'domain', label: 'Domain', assumed: 'time', options: ['time', 'frequency'] },
  { field: 'variable', label: 'Variable', assumed: 'strain', options: ['strain', 'news', 'psi4', 'phi2', 'luminosity'] },
  { field: 'timeUnit', label: 'Unit of the first column', assumed: 'M', options: ['M', 's', '1/M', 'Hz'] },
  { field: 'amplitudeUnit', label: 'Amplitude', assumed: 'rh/M; geometric for φ₂', options: ['rh/M', 'strain', 'geometric', 'perField'] },
  { field: 'polarisation', label: 'Sign of cross', assumed: 'h₊ − i h×, plus-minus-i-cross', options: ['plus-minus-i-cross', 'plus-plus-i-cross'], words: { 'plus-minus-i-cross': 'h₊ − i h×, plus-minus-i-cross', 'plus-plus-i-cross': 'h₊ + i h×, plus-plus-i-cross' } },
  { field: 'negativeM', label: 'Modes with m < 0', assumed: 'given if any is in the file, else mirror', options: ['mirror', 'given', 'none'] },
];

const frames = [
  { field: 'radiusType', label: 'Kind of radius', assumed: 'assumed: areal', options: ['areal', 'isotropic', 'coordinate'] },
  { field: 'timeLabel', label: 'Time label', assumed: 'not given', options: ['retarded', 'coordinate'] },
  { field: 'tetrad', label: 'Tetrad of φ₂', assumed: 'assumed: symmetric', options: ['symmetric', 'kinnersley'] },
] as const;

const binaryFields = [
  ['massRatio', 'Mass ratio q ≥ 1'],
  ['chi1z', 'Spin χ₁z'],
  ['chi2z', 'Spin χ₂z'],
  ['admEnergy', 'Initial energy, M'],
  ['admAngularMomentum', 'Initial angular momentum, M²'],
  ['remnantMass', 'Remnant mass, M'],
  ['remnantSpin', 'Remnant spin'],
  ['eccentricity', 'Eccentricity'],
  ['fieldGauss', 'Magnetic field, G'],
] as const;

const layouts: readonly (readonly [string, string])[] = [
  ['t re im', 'one mode: real and imaginary part'],
  ['t amplitude phase', 'one mode: amplitude and phase'],
  ['t plus cross', 'along a line of sight: plus and cross'],
  ['t plus', 'along a line of sight: plus alone'],
  ['t L', 'a luminosity in erg/s'],
  ['t re22 im22', 'mode set: name each pair with its mode'],
];

/** Words that only files of the other kind have go with the file. */
function fitToFile(form: ComposerForm, index: number): void {
  const at = `waveforms.${index}` as const;
  const { file, columns, rest } = form.getValues(at);
  if (hasDatasets(file) && columns === usualColumns) form.setValue(`${at}.columns`, '', { shouldDirty: true });
  if (!hasDatasets(file)) form.setValue(`${at}.rest`, withMapping(rest, noMapping), { shouldDirty: true });
}

interface WaveformsPartProps {
  readonly id: string;
  readonly form: ComposerForm;
  readonly stored: readonly FileView[];
  readonly desk: GuessDesk;
}

export function WaveformsPart({ id, form, stored, desk }: WaveformsPartProps) {
  const files = stored.map((f) => f.name);
  const rows = useFieldArray({ control: form.control, name: 'waveforms', keyName: 'key' });
  const add = () => rows.append(emptyWaveform(nextName(form.getValues('waveforms').map((w) => w.name)), files.find((f) => !form.getValues('waveforms').some((w) => w.file === f) && !form.getValues('noise').some((n) => n.file === f)) ?? ''));
  const remove = (index: number) => {
    const gone = form.getValues(`waveforms.${index}`);
    rows.remove(index);
    say(`Waveform ${gone.name} is removed.`, () => rows.insert(index, gone));
  };
  return (
    <div className="grid gap-4">
      {rows.fields.length === 0 && <EmptyState level={3} title="No waveform yet">Add a file above, then say here what stands in its columns.</EmptyState>}
      {rows.fields.map((row, i) => <WaveformRow key={row.key} id={id} form={form} index={i} stored={stored} desk={desk} onRemove={() => remove(i)} />)}
      <div><Button onClick={add}>Declare a waveform</Button></div>
    </div>
  );
}

const nextName = (taken: readonly string[]): string => [...'ABCDEFGHJKLMNOPQRTUVWXYZ'].find((n) => !taken.includes(n)) ?? `W${taken.length + 1}`;

function WaveformRow({ id, form, index, stored, desk, onRemove }: WaveformsPartProps & { readonly index: number; readonly onRemove: () => void }) {
  const { register, watch } = form;
  const at = `waveforms.${index}` as const;
  const { name, rest, file } = watch(at);
  const arrays = hasDatasets(file);
  const several = typeof rest.files === 'object' && rest.files !== null ? Object.entries(rest.files as Record<string, string>) : [];
  return (
    <fieldset className="grid gap-3 rounded border border-hair-2 bg-sheet px-4 py-3">
      <legend className="px-1 text-small font-semibold">Waveform {name}</legend>
      <div className="grid gap-3 sm:grid-cols-[110px_minmax(0,1fr)_minmax(0,1fr)]">
        <TextField label="Name" error={errorAt(form, `${at}.name`)} {...register(`${at}.name`)} />
        {several.length > 0 ? (
          <p className="text-ui"><span className="block text-small font-semibold">Files, one a mode</span>{several.map(([mode, file]) => `(${mode}) ${file}`).join(', ')}</p>
        ) : (
          <SelectField label="File" {...register(`${at}.file`, { onChange: () => fitToFile(form, index) })}><FileOptions files={stored.map((f) => f.name)} chosen={file} /></SelectField>
        )}
        <TextField label="Columns, in order" list="layouts" autoComplete="off" spellCheck={false} hint={arrays ? 'Of each dataset, where it has several; assumed: t re im' : 't or f first; _ skips one'} {...register(`${at}.columns`)} />
      </div>
      {arrays && <ArrayPart key={file} submissionId={id} fileId={stored.find((f) => f.name === file)?.id ?? null} waveform={name} file={file} rest={rest} onRest={(next) => form.setValue(`${at}.rest`, next, { shouldDirty: true, shouldTouch: true })} />}
      <datalist id="layouts">{layouts.map(([value, words]) => <option key={value} value={value}>{words}</option>)}</datalist>
      <div className="grid gap-3 sm:grid-cols-3">
        {choices.map((c) => (
          <SelectField key={c.field} label={c.label} {...register(`${at}.${c.field}`)}>
            <option value="">assumed: {c.assumed}</option>
            {c.options.map((o) => <option key={o} value={o}>{c.words?.[o] ?? o}</option>)}
          </SelectField>
        ))}
      </div>
      <Disclosure summary="Which run of the simulation, and the frame it was read off in">
        <div className="grid gap-3 sm:grid-cols-3">
          <TextField label="Series" placeholder="not given" hint="One name for the resolutions or radii of one simulation" {...register(`${at}.series`)} />
          <TextField label="Grid spacing, M" placeholder="not given" inputMode="decimal" error={errorAt(form, `${at}.resolution`)} {...register(`${at}.resolution`)} />
          <TextField label="Extraction radius, M" placeholder="not given" inputMode="decimal" error={errorAt(form, `${at}.extractionRadiusM`)} {...register(`${at}.extractionRadiusM`)} />
          {frames.map(({ field, label, assumed, options }) => (
            <SelectField key={field} label={label} {...register(`${at}.${field}`)}>
              <option value="">{assumed}</option>
              {options.map((o) => <option key={o}>{o}</option>)}
            </SelectField>
          ))}
        </div>
      </Disclosure>
      <Disclosure summary="Mode, own mass and distance, binary">
        <div className="grid gap-3 sm:grid-cols-4">
          <TextField label="Mode ℓ,m" placeholder="assumed: 2,2" {...register(`${at}.mode`)} />
          <TextField label="Own total mass, M⊙" placeholder="not given" inputMode="decimal" error={errorAt(form, `${at}.totalMassMsun`)} {...register(`${at}.totalMassMsun`)} />
          <TextField label="Own distance, Mpc" placeholder="not given" inputMode="decimal" error={errorAt(form, `${at}.distanceMpc`)} {...register(`${at}.distanceMpc`)} />
          <TextField label="Factor of ψ₄" placeholder="assumed: 1" inputMode="decimal" error={errorAt(form, `${at}.psi4Factor`)} {...register(`${at}.psi4Factor`)} />
          <TextField label="End of start-up burst, M" placeholder="not given" inputMode="decimal" error={errorAt(form, `${at}.junkEndM`)} {...register(`${at}.junkEndM`)} />
          {binaryFields.map(([field, label]) => <TextField key={field} label={label} placeholder="not given" inputMode="decimal" error={errorAt(form, `${at}.${field}`)} {...register(`${at}.${field}`)} />)}
        </div>
      </Disclosure>
      <GuessList part="waveforms" name={name.trim()} desk={desk} />
      <div><Button size="low" tone="quiet" onClick={onRemove}>Remove this waveform</Button></div>
    </fieldset>
  );
}
