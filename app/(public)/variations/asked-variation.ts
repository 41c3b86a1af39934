import { parseInput } from '@/lib/http/read-input';
import { changesInput, type AskedChanges } from '@/lib/services/variations/changes';

/** A variation that an address asks for: `?vary=C1&settings={"fLowHz":30}&noise=G2&readings=C02:quieter&mask=10,50`. It fills the form; nothing runs before it is sent. */
export interface AskedVariation {
  readonly claimId: string;
  readonly changes: AskedChanges;
  /** What of it could not be read. */
  readonly trouble: readonly string[];
}

export interface VariationQuery {
  readonly vary?: string | readonly string[];
  readonly settings?: string | readonly string[];
  readonly noise?: string | readonly string[];
  readonly readings?: string | readonly string[];
  readonly mask?: string | readonly string[];
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

function noiseIn(curve: string): AskedChanges['noise'] {
  if (curve === '') return undefined;
  return curve.startsWith('named:') ? { named: curve.slice(6) } : { curve };
}

/** `10,50`; what is no pair of numbers is judged with the rest. */
function maskIn(text: string): AskedChanges['mask'] {
  if (text === '') return undefined;
  const [from = Number.NaN, to = Number.NaN] = text.split(',').map(Number);
  return { from, to };
}

export function askedVariation(query: VariationQuery): AskedVariation | null {
  const claimId = one(query.vary).slice(0, 64);
  if (claimId === '') return null;
  const text = one(query.settings).slice(0, MOST_CHARACTERS);
  const settings = text === '' ? undefined : parsed(text);
  if (text !== '' && settings === undefined) return { claimId, changes: {}, trouble: ['The settings in this address are no JSON. Choose them below.'] };
  const readings = one(query.readings).slice(0, MOST_CHARACTERS).trim().replace(/\s+/g, ' ');
  const [noise, mask] = [noiseIn(one(query.noise).slice(0, MOST_CHARACTERS)), maskIn(one(query.mask).slice(0, 100))];
  const asked = { ...(settings !== undefined && { settings }), ...(noise && { noise }), ...(readings !== '' && { readings: readings.split(' ') }), ...(mask && { mask }) };
  if (Object.keys(asked).length === 0) return { claimId, changes: {}, trouble: [] };
  const changes = parseInput(changesInput, asked);
  if (changes.ok) return { claimId, changes: changes.value, trouble: [] };
  return { claimId, changes: {}, trouble: ['The change in this address cannot be read.', ...(changes.error.problems ?? []).map((p) => `${p.where}: saw ${p.saw}; expected ${p.expected}.`)] };
}

/** Readings are parted by spaces: an id may hold a comma. The query that fills the form with these changes. */
export function askingQuery(claimId: string, { settings, noise, readings, mask }: AskedChanges): URLSearchParams {
  const curve = noise && ('curve' in noise ? noise.curve : `named:${noise.named}`);
  return new URLSearchParams({ vary: claimId, ...(settings && { settings: JSON.stringify(settings) }), ...(curve && { noise: curve }), ...(readings && { readings: readings.join(' ') }), ...(mask && { mask: `${mask.from},${mask.to}` }) });
}
