'use client';
import { useMemo, useState } from 'react';
import { settingsWith } from '@/app/(desk)/compose/[id]/quantity-row';
import { SettingControl } from '@/app/(desk)/compose/[id]/setting-control';
import { settingText } from '@/app/(desk)/compose/[id]/claim-fields';
import { Trouble } from '@/app/(desk)/act-parts';
import { useAct } from '@/app/(desk)/use-act';
import { formatAt, formatSetting, settingLabel } from '@/app/_ui/claim/setting-names';
import { readable } from '@/app/_ui/math/format-number';
import { Button } from '@/app/_ui/primitives/button';
import { SelectField, TextareaField } from '@/app/_ui/primitives/control';
import { useOnline } from '@/app/_ui/primitives/offline-strap';
import { requestVariation } from './actions';
import type { AskedVariation } from './asked-variation';
import { atOnce } from './at-once';
import { changesFrom, fieldsFrom, isUnchanged, type VariationFields } from './variation-fields';
import { AnotherReading, ChosenReadings, MaskFields, type PartProps } from './variation-readings';
import type { VariationSource } from './variation-source';
import { toleranceInUnit, VariedNumber } from './varied-number';

/** Places of a sweep that are told at once. */
const SHOWN_AT_ONCE = 6;

interface FormProps {
  readonly source: VariationSource;
  readonly asked: AskedVariation | null;
}

/** Any setting of the claim, and its curve. What is not touched stays as the authors declared it. */
export function VariationForm({ source, asked }: FormProps) {
  const [fields, setFields] = useState<VariationFields>(() => fieldsFrom(asked?.changes ?? {}));
  const { busy, trouble, run } = useAct(requestVariation, () => setFields(fieldsFrom({})));
  const online = useOnline();
  const changes = useMemo(() => changesFrom(fields, source.declared), [fields, source.declared]);
  const submit = () => void run({ id: source.submissionId, variation: { claimId: source.claimId, revision: source.revision, changes, note: fields.note } });
  return (
    <form className="grid gap-3" aria-label={`Variation of ${source.claimId}`} onSubmit={(e) => { e.preventDefault(); if (!isUnchanged(changes)) submit(); }}>
      <Trouble trouble={asked && asked.trouble.length > 0 ? asked.trouble : null} />
      <ChosenSettings source={source} fields={fields} onFields={setFields} />
      <ChosenReadings source={source} fields={fields} onFields={setFields} />
      <div className="grid gap-3 sm:grid-cols-2">
        <AnotherSetting source={source} fields={fields} onFields={setFields} />
        <AnotherReading source={source} fields={fields} onFields={setFields} />
        {source.noise && <CurveChoice noise={source.noise} value={fields.noise} onValue={(noise) => setFields({ ...fields, noise })} />}
        <MaskFields source={source} fields={fields} onFields={setFields} />
      </div>
      <TextareaField label="Note" rows={2} maxLength={2000} value={fields.note} onChange={(e) => setFields({ ...fields, note: e.target.value })} hint="Why you tried it. Whoever sees the variation reads it." />
      <AtOnceLine source={source} changes={changes} />
      <div className="flex flex-wrap items-center gap-3">
        <Button type="submit" size="low" busy={busy ? 'Asking for it' : null} aria-disabled={isUnchanged(changes) || !online}>Compute the variation</Button>
        {isUnchanged(changes) && <span className="text-small text-ink-2">Change something first.</span>}
        {!online && <span className="text-small text-ink-2">No connection. What you entered stays here.</span>}
      </div>
      <Trouble trouble={trouble} />
    </form>
  );
}

const without = (settings: VariationFields['settings'], name: string): VariationFields['settings'] => Object.fromEntries(Object.entries(settings).filter(([other]) => other !== name));

function ChosenSettings({ source, fields, onFields }: PartProps) {
  const rows = source.quantity.settings.filter(({ name }) => name in fields.settings);
  if (rows.length === 0) return null;
  return (
    <div className="grid gap-3 sm:grid-cols-2">
      {rows.map((row) => (
        <div key={row.name} className="grid content-start gap-1">
          <SettingControl row={row} title={settingLabel(row.name)} undeclared={row.name in source.declared ? 'not declared' : `assumed: ${row.houseDefault}`} name={`${source.claimId}-vary-${row.name}`} value={fields.settings[row.name] ?? ''} onChange={(e) => onFields({ ...fields, settings: { ...fields.settings, [row.name]: e.target.value } })} />
          <p className="flex flex-wrap items-center gap-x-3 text-small text-ink-2">
            <span>{standingWords(source, row.name)}</span>
            <Button size="low" tone="quiet" aria-label={`Leave ${settingLabel(row.name)} as it is`} onClick={() => onFields({ ...fields, settings: without(fields.settings, row.name) })}>Leave as it is</Button>
          </p>
        </div>
      ))}
    </div>
  );
}

/** What the official number took: `declared 20 Hz`, `assumed detector`. */
function standingWords({ settings, declared, swept }: VariationSource, name: string): string {
  if (name === swept) return 'swept; one value takes the place of the sweep';
  const used = settings.find((s) => s.name === name);
  if (used) return `${used.standing} ${formatSetting(name, used.value, used.unit)}`;
  return name in declared ? `declared ${formatSetting(name, declared[name])}` : 'not declared';
}

function AnotherSetting({ source, fields, onFields }: PartProps) {
  const written = { ...Object.fromEntries(Object.entries(source.declared).map(([name, value]) => [name, settingText(value)])), ...fields.settings };
  const others = settingsWith(source.quantity, written).filter(({ name }) => !(name in fields.settings));
  const choose = (name: string) => {
    const used = source.settings.find((s) => s.name === name);
    const start = name in source.declared ? source.declared[name] : used && used.standing !== 'swept' ? used.value : undefined;
    onFields({ ...fields, settings: { ...fields.settings, [name]: settingText(start) } });
  };
  return (
    <SelectField label="Change a setting" value="" onChange={(e) => { if (e.target.value) choose(e.target.value); }}>
      <option value="">choose one</option>
      {others.map((row) => <option key={row.name} value={row.name}>{settingLabel(row.name)} ({row.name}){row.name in source.declared ? ', declared' : row.name === source.swept ? ', swept' : ''}</option>)}
    </SelectField>
  );
}

function CurveChoice({ noise, value, onValue }: { readonly noise: NonNullable<VariationSource['noise']>; readonly value: string; readonly onValue: (value: string) => void }) {
  return (
    <SelectField label="Noise curve" value={value} onChange={(e) => onValue(e.target.value)}>
      <option value="">as declared{noise.current && `: ${noise.current}`}</option>
      {noise.named.map((name) => <option key={name} value={`named:${name}`}>{name}, from the sheet</option>)}
      {noise.builtIn.map(({ id, title }) => <option key={id} value={id}>{id}, {title}</option>)}
    </SelectField>
  );
}

/** Both numbers to the same digits: those of the official one's tolerance. */
function againstOf({ points, quantity }: VariationSource, i: number, value: number | null) {
  const official = points[i];
  return { tolerance: toleranceInUnit(official?.tolerance ?? null, quantity.scale, official?.value ?? null), apart: official?.value != null && value !== null ? value - official.value : null };
}

/** Where the change is a factor, the number is there while one types; the rerun follows when it is asked for. */
function AtOnceLine({ source, changes }: { readonly source: VariationSource; readonly changes: ReturnType<typeof changesFrom> }) {
  const known = atOnce({ ...source, quantity: source.quantity.id }, changes);
  const more = source.points.length - SHOWN_AT_ONCE;
  return (
    <div role="status" className="text-ui">
      {known && (
        <div className="rounded border border-hair-2 bg-sheet px-3 py-2">
          <p><strong>At once</strong>, by {known.factor === null ? 'a factor at each place' : `the factor ${readable(known.factor, 6)}`} on the {source.isDraft ? 'checked' : 'official'} number; nothing was rerun:</p>
          <ul>{known.points.slice(0, SHOWN_AT_ONCE).map((p, i) => <li key={i}>{Object.keys(p.at).length > 0 && `${formatAt(p.at)}: `}<VariedNumber value={p.official} u={source.points[i]?.expandedUncertainty ?? null} unit={source.unit} against={againstOf(source, i, p.value)} /> → <VariedNumber value={p.value} u={p.expandedUncertainty} unit={source.unit} against={againstOf(source, i, p.value)} /></li>)}</ul>
          {more > 0 && <p className="text-small text-ink-2">and at {more} more {more === 1 ? 'place' : 'places'}</p>}
        </div>
      )}
    </div>
  );
}
