import { parseInput } from '@/lib/http/read-input';
import { changesInput } from '@/lib/services/variations/changes';
import type { VariationChanges } from '@/lib/services/variations/variation-view';

/** A variation that an address asks for: `?vary=C1&settings={"fLowHz":30}&noise=G2`. It fills the form; nothing runs before it is sent. */
export interface AskedVariation {
  readonly claimId: string;
  readonly changes: VariationChanges;
  /** What of it could not be read. */
  readonly trouble: readonly string[];
}

export interface VariationQuery {
  readonly vary?: string | readonly string[];
  readonly settings?: string | readonly string[];
  readonly noise?: string | readonly string[];
}

const MOST_CHARACTERS = 4000;
const one = (value: VariationQuery['vary']): string => (typeof value === 'string' ? value : (value?.[0] ?? ''));

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

export function askedVariation(query: VariationQuery): AskedVariation | null {
  const claimId = one(query.vary).slice(0, 64);
  if (claimId === '') return null;
  const text = one(query.settings).slice(0, MOST_CHARACTERS);
  const settings = text === '' ? undefined : parsed(text);
  const curve = one(query.noise).slice(0, MOST_CHARACTERS);
  const noise = curve === '' ? undefined : curve.startsWith('named:') ? { named: curve.slice(6) } : { curve };
  if (text !== '' && settings === undefined) return { claimId, changes: {}, trouble: ['The settings in this address are no JSON. Choose them below.'] };
  if (settings === undefined && noise === undefined) return { claimId, changes: {}, trouble: [] };
  const changes = parseInput(changesInput, { ...(settings !== undefined && { settings }), ...(noise && { noise }) });
  if (changes.ok) return { claimId, changes: changes.value, trouble: [] };
  return { claimId, changes: {}, trouble: ['The change in this address cannot be read.', ...(changes.error.problems ?? []).map((p) => `${p.where}: saw ${p.saw}; expected ${p.expected}.`)] };
}
