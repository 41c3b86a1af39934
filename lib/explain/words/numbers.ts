const superscripts: Readonly<Record<string, string>> = { '-': '⁻', '0': '⁰', '1': '¹', '2': '²', '3': '³', '4': '⁴', '5': '⁵', '6': '⁶', '7': '⁷', '8': '⁸', '9': '⁹' };
const powerOfTen = (exponent: number): string => `10${[...String(exponent)].map((c) => superscripts[c] ?? c).join('')}`;

/** Power of ten of the first significant digit. */
const exponentOf = (value: number): number => Number(value.toExponential().split('e')[1]);
const minus = (text: string): string => text.replace('-', '−');
const isPlain = (value: number): boolean => value === 0 || (Math.abs(value) >= 1e-3 && Math.abs(value) < 1e7);
const withUnit = (text: string, unit: string): string => (unit === '' ? text : `${text} ${unit}`);

/** Decimals at which the last place of the uncertainty stands: two digits, rounded up, as everywhere. */
function roundedUp(uncertainty: number): { readonly text: number; readonly last: number } {
  const last = exponentOf(uncertainty) - 1;
  const digits = Math.ceil(Number((uncertainty * 10 ** -last).toPrecision(10)));
  return { text: Number(`${digits}e${last}`), last: digits === 100 ? last + 1 : last };
}

/** A number to a place of ten; with a power of ten where it is very small or large. */
function toPlace(value: number, place: number): string {
  if (isPlain(value)) return minus(value.toFixed(Math.min(20, Math.max(0, -place))));
  const power = exponentOf(value);
  return `${minus((value / 10 ** power).toFixed(Math.min(15, Math.max(0, power - place))))} × ${powerOfTen(power)}`;
}

/** Beside a plain number a bar stays plain a little longer: it stands under the same decimals. */
const LEAST_PLAIN_BAR = 1e-4;

/** `0.91854 ± 0.00090`; what has no uncertainty says so. */
export function measuredNumber(value: number, uncertainty: number | null, unit = ''): string {
  if (uncertainty === null || !(uncertainty > 0) || !Number.isFinite(uncertainty)) return withUnit(`${plainNumber(value)}${uncertainty === 0 ? '' : ' ± unknown'}`, unit);
  const { text, last } = roundedUp(uncertainty);
  if (isPlain(value) && text >= LEAST_PLAIN_BAR) return withUnit(`${toPlace(value, last)} ± ${text.toFixed(Math.min(20, Math.max(0, -last)))}`, unit);
  if (isPlain(value)) return withUnit(`${toPlace(value, last)} ± ${toPlace(text, exponentOf(text) - 1)}`, unit);
  const power = exponentOf(value);
  const places = Math.min(15, Math.max(0, power - last));
  return withUnit(`(${minus((value / 10 ** power).toFixed(places))} ± ${(text / 10 ** power).toFixed(places)}) × ${powerOfTen(power)}`, unit);
}

/** A claimed number with the digits it was printed with. */
export const claimedNumber = (value: number, halfDigit: number, unit = ''): string => withUnit(halfDigit > 0 ? toPlace(value, Math.round(Math.log10(2 * halfDigit))) : plainNumber(value), unit);

/** As many digits as it has, but none of the noise of binary fractions. */
export function plainNumber(value: number, digits = 8): string {
  const short = Number(value.toPrecision(digits));
  if (isPlain(short)) return minus(String(short));
  const [mantissa = '', power = '0'] = short.toExponential().split('e');
  return `${minus(mantissa)} × ${powerOfTen(Number(power))}`;
}

const words = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve'];
export const countWord = (n: number): string => words[n] ?? String(n);
export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

export const listOf = (items: readonly string[], last = 'and'): string => (items.length < 2 ? (items[0] ?? '') : `${items.slice(0, -1).join(', ')} ${last} ${items.at(-1)}`);

/** A share as a percentage, honest at both ends. */
export function percentage(share: number): string {
  if (share < 0.001) return 'less than 0.1 %';
  if (share < 0.0995) return `${Number((100 * share).toPrecision(share < 0.01 ? 1 : 2))} %`;
  return share > 0.995 ? 'almost all' : `${Math.round(100 * share)} %`;
}
