import { parseClaimed } from '@/lib/claims/claimed';
import { claimedFrom } from './claim-fields';

/** How the server will read what is typed, while it is typed. */
export function readingOf(typed: string, sweep: boolean, overValues: string): string {
  const parts = sweep ? typed.split(';').map((p) => p.trim()).filter(Boolean) : [typed];
  if (typed.trim() === '') return 'as printed, for example 0.9984(3); > 0.99 for a bound; = 0.9984 for an exact number';
  const wanted = overValues.split(';').filter((v) => v.trim()).length;
  const oneBound = parts.length === 1 && /^[<>]/.test(typed.trim());
  if (sweep && parts.length !== wanted && !oneBound) return `${parts.length} ${parts.length === 1 ? 'value' : 'values'} for ${wanted} places: give one for each, with ; between`;
  return parts.map((part) => oneReading(part)).join('; ');
}

function oneReading(part: string): string {
  const read = parseClaimed(claimedFrom(part));
  if (!read.ok) return `${part}: ${read.error.expected}`;
  const c = read.value;
  if (c.kind !== 'value') return `${c.kind} ${c.bound}`;
  const digits = c.digits === null ? 'exact' : `last digit 10${raised(-c.digits)}`;
  return `${c.value}${c.uncertainty === null ? '' : ` ± ${c.uncertainty}`}, ${digits}`;
}

const raised = (n: number): string => [...String(n)].map((sign) => (sign === '-' ? '⁻' : '⁰¹²³⁴⁵⁶⁷⁸⁹'.charAt(Number(sign)))).join('');
