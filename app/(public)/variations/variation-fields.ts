import { settingFrom, settingText } from '@/app/(desk)/compose/[id]/claim-fields';
import type { AskedChanges } from '@/lib/services/variations/changes';

/** The form: each chosen setting as typed, `''` for one taken away; the curve as `''`, an id or `named:S`; both ends of a mask as typed. */
export interface VariationFields {
  readonly settings: Readonly<Record<string, string>>;
  readonly noise: string;
  readonly readings: readonly string[];
  readonly mask: { readonly from: string; readonly to: string };
  readonly note: string;
}

const noiseFrom = (noise: string): Pick<AskedChanges, 'noise'> => (noise === '' ? {} : { noise: noise.startsWith('named:') ? { named: noise.slice(6) } : { curve: noise } });

/** What is half typed, or no number, is none; the server says what it expected. */
const end = (typed: string): number => (typed.trim() === '' ? Number.NaN : Number(typed));
const maskFrom = ({ from, to }: VariationFields['mask']): Pick<AskedChanges, 'mask'> => (from.trim() === '' && to.trim() === '' ? {} : { mask: { from: end(from), to: end(to) } });

/** Typed anew as the sheet has it: no change. */
const asDeclared = (value: unknown, declared: unknown): boolean => declared !== undefined && settingText(value) === settingText(declared);

/** What was typed, as the server takes it: an empty box takes a declared setting away, and leaves another as it is. */
export function changesFrom({ settings, noise, readings, mask }: VariationFields, declared: Readonly<Record<string, unknown>>): AskedChanges {
  const entries = Object.entries(settings).flatMap(([name, typed]): [string, unknown][] => {
    const value = settingFrom(name, typed);
    if (value !== undefined) return asDeclared(value, declared[name]) ? [] : [[name, value]];
    return name in declared ? [[name, null]] : [];
  });
  return { ...(entries.length > 0 && { settings: Object.fromEntries(entries) }), ...noiseFrom(noise), ...(readings.length > 0 && { readings }), ...maskFrom(mask) };
}

export const fieldsFrom = ({ settings = {}, noise, readings = [], mask }: AskedChanges, note = ''): VariationFields => ({
  settings: Object.fromEntries(Object.entries(settings).map(([name, value]) => [name, settingText(value)])),
  noise: noise === undefined ? '' : 'curve' in noise ? noise.curve : `named:${noise.named}`,
  readings,
  mask: mask ? { from: String(mask.from), to: String(mask.to) } : { from: '', to: '' },
  note,
});

export const isUnchanged = (changes: AskedChanges): boolean => Object.keys(changes).length === 0;
