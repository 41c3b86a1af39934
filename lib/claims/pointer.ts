/** JSON Pointer (RFC 6901) of a place in the sheet. */
export const pointer = (...path: readonly PropertyKey[]): string => path.map((part) => `/${String(part).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');

const shown = 60;

/** What was seen, for a person: short, printable, never a dump. */
export function describe(value: unknown): string {
  if (value === undefined) return 'nothing';
  if (typeof value === 'number' && !Number.isFinite(value)) return 'a number outside the range of double precision';
  if (Array.isArray(value)) return value.length > 6 ? `a list of ${value.length} entries` : short(value);
  return short(value);
}

function short(value: unknown): string {
  const text = textOf(value);
  const printable = text.replace(/[\u007f-\u009f\u200b-\u200f\u2028-\u202e\u2066-\u2069]/g, (c) => `\\u${c.charCodeAt(0).toString(16).padStart(4, '0')}`);
  return printable.length > shown ? `${printable.slice(0, shown)}…` : printable;
}

/** A value nested without end overflows the stack of JSON.stringify; it is not worth printing. */
function textOf(value: unknown): string {
  try {
    return JSON.stringify(value) ?? String(value);
  } catch {
    return 'a value that cannot be printed';
  }
}
