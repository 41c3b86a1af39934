import Link from 'next/link';
import { settingText } from '@/app/(desk)/compose/[id]/claim-fields';
import { conventionHref } from '@/app/_ui/claim/convention-words';
import { Button } from '@/app/_ui/primitives/button';
import { SelectField, TextField } from '@/app/_ui/primitives/control';
import type { VariationFields } from './variation-fields';
import type { SourceReading, VariationSource } from './variation-source';

export interface PartProps {
  readonly source: VariationSource;
  readonly fields: VariationFields;
  readonly onFields: (fields: VariationFields) => void;
}

/** One reading of a convention at a time: a second takes the place of the first. */
function withReading({ readings, ...fields }: VariationFields, { id, convention, says }: SourceReading): VariationFields {
  if (says?.noise !== undefined) return { ...fields, readings, noise: says.noise };
  if (says?.settings) return { ...fields, readings, settings: { ...fields.settings, ...Object.fromEntries(Object.entries(says.settings).map(([name, value]) => [name, settingText(value)])) } };
  return { ...fields, readings: [...readings.filter((other) => !other.startsWith(`${convention}:`)), id] };
}

const capital = (words: string): string => words.replace(/^./, (c) => c.toUpperCase());

function byConvention(readings: readonly SourceReading[]): readonly (readonly [string, readonly SourceReading[]])[] {
  const groups = new Map<string, SourceReading[]>();
  for (const reading of readings) groups.set(reading.convention, [...(groups.get(reading.convention) ?? []), reading]);
  return [...groups];
}

/** Every convention of the catalogue that can be read otherwise here: by a setting, an edit of the inputs, or a factor. */
export function AnotherReading({ source, fields, onFields }: PartProps) {
  const choose = (id: string) => {
    const reading = source.readings.find((one) => one.id === id);
    if (reading) onFields(withReading(fields, reading));
  };
  if (source.withoutReadings !== null) return <p className="self-center text-small text-ink-2">{source.withoutReadings}</p>;
  if (source.readings.length === 0) return null;
  return (
    <SelectField label="Read a convention otherwise" value="" onChange={(e) => choose(e.target.value)} hint="A reading is no setting: files or number are taken as the words say.">
      <option value="">choose one</option>
      {byConvention(source.readings).map(([id, readings]) => (
        <optgroup key={id} label={`${id}, ${readings[0]?.title ?? ''}`}>
          {readings.filter((reading) => !fields.readings.includes(reading.id)).map((reading) => <option key={reading.id} value={reading.id}>{capital(reading.clause)}{reading.factor !== null ? ' (at once)' : ''}</option>)}
        </optgroup>
      ))}
    </SelectField>
  );
}

export function ChosenReadings({ source, fields, onFields }: PartProps) {
  if (fields.readings.length === 0) return null;
  return (
    <ul className="grid gap-2" aria-label="Read otherwise">
      {fields.readings.map((id) => <Chosen key={id} id={id} reading={source.readings.find((one) => one.id === id)} onLeave={() => onFields({ ...fields, readings: fields.readings.filter((other) => other !== id) })} />)}
    </ul>
  );
}

function Chosen({ id, reading, onLeave }: { readonly id: string; readonly reading: SourceReading | undefined; readonly onLeave: () => void }) {
  return (
    <li className="flex flex-wrap items-center gap-x-3 gap-y-1 rounded border border-hair-2 bg-sheet px-3 py-1.5 text-ui">
      <span className="min-w-0 flex-1 basis-60"><strong>Reading</strong>: {reading ? `as if ${reading.clause}` : `${id}, which the number that stands does not offer`}</span>
      {reading && <Link href={conventionHref(reading.convention)} className="inline-flex min-h-8 items-center text-small">{reading.convention}, {reading.title}</Link>}
      <Button size="low" tone="quiet" aria-label={`Leave out the reading ${reading?.clause ?? id}`} onClick={onLeave}>Leave as declared</Button>
    </li>
  );
}

/** A stretch of the records that does not count: a burst at the start, a glitch. */
export function MaskFields({ fields, onFields }: PartProps) {
  const of = (end: 'from' | 'to') => ({
    value: fields.mask[end], inputMode: 'decimal' as const, autoComplete: 'off',
    onChange: (e: { readonly target: { readonly value: string } }) => onFields({ ...fields, mask: { ...fields.mask, [end]: e.target.value } }),
  });
  return (
    <fieldset className="grid content-start gap-1">
      <legend className="mb-1 text-ui font-semibold">Leave out a stretch of time</legend>
      <div className="grid grid-cols-2 gap-3">
        <TextField label="From" {...of('from')} />
        <TextField label="Until" {...of('to')} />
      </div>
      <p className="text-small text-ink-2">In the files’ own time; set to zero, with edges of a tenth of the stretch.</p>
    </fieldset>
  );
}
