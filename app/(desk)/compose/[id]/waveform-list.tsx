'use client';
import { Button } from '@/app/_ui/primitives/button';
import { Checkbox } from '@/app/_ui/primitives/control';
import type { ComposerForm } from './waveform-part';

interface ListProps {
  readonly form: ComposerForm;
  readonly index: number;
  readonly role: 'signals' | 'templates';
  readonly label: string;
  readonly names: readonly string[];
}

/** The waveforms of a list, chosen one by one; kept in the order in which they are declared. */
export function WaveformList({ form, index, role, label, names }: ListProps) {
  const at = `claims.${index}.${role}` as const;
  const chosen = form.watch(at);
  const all = [...names, ...chosen.filter((name) => !names.includes(name))];
  const put = (next: readonly string[]) => form.setValue(at, all.filter((name) => next.includes(name)), { shouldDirty: true });
  return (
    <fieldset className="grid gap-2">
      <legend className="text-small font-semibold">{label}</legend>
      {all.length === 0 && <p className="text-small text-ink-2">No waveform is declared yet.</p>}
      <div className="flex max-h-48 flex-wrap gap-x-5 overflow-y-auto" tabIndex={0} role="group" aria-label={`${label}, ${chosen.length} of ${all.length} chosen`}>
        {all.map((name) => <Checkbox key={name} label={names.includes(name) ? name : `${name} (not declared)`} checked={chosen.includes(name)} onChange={(e) => put(e.target.checked ? [...chosen, name] : chosen.filter((other) => other !== name))} />)}
      </div>
      <div className="flex gap-2">
        <Button size="low" tone="quiet" aria-label={`Choose all for ${label}`} onClick={() => put(all)}>All</Button>
        <Button size="low" tone="quiet" aria-label={`Choose none for ${label}`} onClick={() => put([])}>None</Button>
      </div>
    </fieldset>
  );
}
