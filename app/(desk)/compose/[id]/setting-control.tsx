import type { ChangeEventHandler, FocusEventHandler, Ref } from 'react';
import { SelectField, TextField } from '@/app/_ui/primitives/control';
import type { SettingRow } from '@/lib/engine/quantities/settings-table';

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

interface SettingControlProps {
  readonly row: SettingRow;
  /** In words; the name of the contract then stands after it. */
  readonly title?: string;
  /** What holds where nothing is entered. */
  readonly undeclared: string;
  readonly name: string;
  readonly value?: string;
  readonly ref?: Ref<HTMLInputElement & HTMLSelectElement>;
  readonly onChange: ChangeEventHandler<HTMLInputElement | HTMLSelectElement>;
  readonly onBlur?: FocusEventHandler<HTMLInputElement | HTMLSelectElement>;
}

/** One setting of a claim, in the box that its shape asks for; the composer and a variation draw it alike. */
export function SettingControl({ row, title, undeclared, ...field }: SettingControlProps) {
  const label = <><span className="font-semibold">{title ?? row.name}</span>{title && <> <code className="font-code text-code font-normal text-ink-2">{row.name}</code></>}{row.unit && <span className="font-normal text-ink-2">, {row.unit}</span>}</>;
  if (row.shape.kind === 'choice')
    return <SelectField label={label} hint={row.meaning} {...field}><option value="">{undeclared}</option>{row.shape.options.map((o) => <option key={String(o)}>{String(o)}</option>)}</SelectField>;
  return <TextField label={label} placeholder={undeclared} hint={[row.meaning, rangeOf(row)].filter(Boolean).join(' ')} spellCheck={false} {...field} />;
}
