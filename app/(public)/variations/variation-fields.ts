import { settingFrom, settingText } from '@/app/(desk)/compose/[id]/claim-fields';
import type { VariationChanges } from '@/lib/services/variations/variation-view';

/** The form: each chosen setting as typed, `''` for one taken away; the curve as `''`, an id or `named:S`. */
export interface VariationFields {
  readonly settings: Readonly<Record<string, string>>;
  readonly noise: string;
  readonly note: string;
}

const noiseFrom = (noise: string): Pick<VariationChanges, 'noise'> => (noise === '' ? {} : { noise: noise.startsWith('named:') ? { named: noise.slice(6) } : { curve: noise } });

/** What was typed, as the server takes it: an empty box takes a declared setting away, and leaves another as it is. */
export function changesFrom({ settings, noise }: VariationFields, declared: Readonly<Record<string, unknown>>): VariationChanges {
  const entries = Object.entries(settings).flatMap(([name, typed]): [string, unknown][] => {
    const value = settingFrom(name, typed);
    if (value !== undefined) return [[name, value]];
    return name in declared ? [[name, null]] : [];
  });
  return { ...(entries.length > 0 && { settings: Object.fromEntries(entries) }), ...noiseFrom(noise) };
}

export const fieldsFrom = ({ settings = {}, noise }: VariationChanges, note = ''): VariationFields => ({
  settings: Object.fromEntries(Object.entries(settings).map(([name, value]) => [name, settingText(value)])),
  noise: noise === undefined ? '' : 'curve' in noise ? noise.curve : `named:${noise.named}`,
  note,
});

export const isUnchanged = (changes: VariationChanges): boolean => changes.settings === undefined && changes.noise === undefined;
