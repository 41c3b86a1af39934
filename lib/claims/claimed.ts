import type { Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import { describe } from './pointer';

/** What the author claims at one point. `digits` are decimals: 4 for 0.9984, 0 for 3996, −2 for 1.2e3's hundred. */
export type Claimed =
  | { readonly kind: 'value'; readonly value: number; readonly uncertainty: number | null; readonly digits: number | null; readonly printed: string }
  | { readonly kind: 'above' | 'below'; readonly bound: number; readonly printed: string };

type Fault = Omit<Problem, 'where'>;
const expected = 'a number, a string such as "0.9984" or "0.9984(3)", {"value": …, "uncertainty": …}, {"above": …} or {"below": …}';
const fault = (saw: string, hint?: string): Result<never, Fault> => err({ code: 'claims/claimed', saw, expected, ...(hint ? { hint } : {}) });

/** One claimed entry of the sheet; a negative zero is zero. The inverse is `formatClaimed`. */
export function parseClaimed(raw: unknown): Result<Claimed, Fault> {
  if (typeof raw === 'number') return Number.isFinite(raw) ? ok({ kind: 'value', value: raw + 0, uncertainty: null, digits: null, printed: String(raw) }) : fault(describe(raw));
  if (typeof raw === 'string') return parsePrinted(raw);
  if (typeof raw !== 'object' || raw === null || Array.isArray(raw)) return fault(describe(raw));
  const names = Object.keys(raw).sort().join(' ');
  if (names === 'above' || names === 'below') return parseBound(names, (raw as Record<string, unknown>)[names]);
  if (names === 'uncertainty value' || names === 'value') return parsePair(raw as { value: unknown; uncertainty?: unknown });
  return fault(describe(raw));
}

/** The sheet's own form of a claimed entry. */
export function formatClaimed(claimed: Claimed): unknown {
  if (claimed.kind !== 'value') return { [claimed.kind]: boundText(claimed) };
  if (claimed.digits !== null) {
    const parsed = parsePrinted(claimed.printed);
    if (parsed.ok) return claimed.printed;
    return { value: claimed.printed.split(' ± ')[0], uncertainty: claimed.uncertainty };
  }
  return claimed.uncertainty === null ? claimed.value : { value: claimed.value, uncertainty: claimed.uncertainty };
}

/** A bound keeps the digits it was printed with, though they widen nothing. */
const boundText = (claimed: Extract<Claimed, { bound: number }>): number | string => {
  const printed = claimed.printed.replace(/^[<>] /, '');
  return printed === String(claimed.bound) ? claimed.bound : printed;
};

/** Half a unit of the last printed digit; zero for a JSON number, which is taken as exact. */
export const halfLastDigit = (claimed: Extract<Claimed, { kind: 'value' }>): number => (claimed.digits === null ? 0 : 0.5 * tenTo(-claimed.digits));

const tenTo = (e: number): number => Number(`1e${e}`);

const decimal = String.raw`([+-]?(?:\d+(?:\.\d*)?|\.\d+))`;
const printedForm = new RegExp(String.raw`^${decimal}(?:\((\d+)\))?(?:[eE]([+-]?\d{1,4}))?(?:\((\d+)\))?$`);
const plusMinusForm = /^(\S+)\s*(?:±|\+\/-|\+-)\s*(\S+)$/;

function parsePrinted(raw: string): Result<Claimed, Fault> {
  const text = raw.trim();
  const pair = plusMinusForm.exec(text);
  if (pair) return parsePair({ value: pair[1], uncertainty: pair[2] }, text);
  const found = printedForm.exec(text);
  if (!found || (found[2] !== undefined && found[4] !== undefined)) return fault(...misprint(text));
  const mantissa = found[1] ?? '';
  const exponent = Number(found[3] ?? 0);
  const value = Number(`${mantissa}e${exponent}`) + 0;
  const digits = (mantissa.split('.')[1]?.length ?? 0) - exponent;
  if (!Number.isFinite(value) || Math.abs(digits) > 400) return fault(`${describe(text)}, outside the range of double precision`);
  const last = found[2] ?? found[4];
  const uncertainty = last === undefined ? null : Number(`${last}e${-digits}`);
  if (uncertainty !== null && !(uncertainty > 0 && Number.isFinite(uncertainty))) return fault(`${describe(text)} with an uncertainty of zero`, 'Leave the brackets out when no uncertainty is stated.');
  return ok({ kind: 'value', value, uncertainty, digits, printed: text });
}

function misprint(text: string): [saw: string, hint?: string] {
  const saw = describe(text);
  if (/[\u2212\u2010-\u2015]/.test(text)) return [`${saw} with a typographic minus sign`, 'Replace it by the plain "-".'];
  if (/\d,\d/.test(text)) return [`${saw} with a comma`, 'Write a decimal point, and no separator between thousands.'];
  if (/^[<>≤≥]/.test(text)) return [saw, 'Write an inequality as {"above": 0.999} or {"below": 0.001}.'];
  if (/%/.test(text)) return [`${saw} in per cent`, 'Write the fraction: 0.655 for 65.5 %.'];
  if (/^[+-]?0x/i.test(text)) return [`the hexadecimal ${saw}`];
  if (/nan|inf/i.test(text)) return [`${saw}, which is not a finite number`];
  if (/[×x*]\s*10|\^/.test(text)) return [saw, 'Write powers of ten as 1.5e-21.'];
  if (/\d\s*[A-Za-zµ☉]+/.test(text)) return [saw, 'Leave the unit out; each quantity has its own.'];
  return [saw];
}

function parsePair(raw: { value: unknown; uncertainty?: unknown }, printed?: string): Result<Claimed, Fault> {
  const value = parsePlain(raw.value);
  const uncertainty = raw.uncertainty === undefined ? null : parsePlain(raw.uncertainty);
  if (!value.ok) return value;
  if (uncertainty && !uncertainty.ok) return uncertainty;
  if (uncertainty && !(uncertainty.value.value > 0)) return fault(`an uncertainty of ${uncertainty.value.printed}`, 'An uncertainty is above zero; leave it out when none is stated.');
  const words = printed ?? (uncertainty ? `${value.value.printed} ± ${uncertainty.value.printed}` : value.value.printed);
  return ok({ ...value.value, uncertainty: uncertainty ? uncertainty.value.value : null, printed: words });
}

function parsePlain(raw: unknown): Result<Extract<Claimed, { kind: 'value' }>, Fault> {
  if (typeof raw !== 'number' && typeof raw !== 'string') return fault(describe(raw));
  if (typeof raw === 'string' && plusMinusForm.test(raw)) return fault(describe(raw));
  const parsed = parseClaimed(raw);
  if (!parsed.ok) return parsed;
  return parsed.value.kind === 'value' && parsed.value.uncertainty === null ? ok(parsed.value) : fault(describe(raw));
}

function parseBound(kind: 'above' | 'below', raw: unknown): Result<Claimed, Fault> {
  const bound = parsePlain(raw);
  if (!bound.ok) return bound;
  return ok({ kind, bound: bound.value.value, printed: `${kind === 'above' ? '>' : '<'} ${bound.value.printed}` });
}
