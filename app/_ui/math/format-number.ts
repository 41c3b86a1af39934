/**
 * Numbers as they are printed: with a true minus, in tabular digits, never cut short, and with
 * the uncertainty they carry. Pure functions; the components beside them only set the parts in type.
 */
export interface NumberParts {
  readonly sign: '' | '−' | '+';
  readonly integer: string;
  /** Digits after the point, or empty. */
  readonly fraction: string;
  /** The power of ten, or null for plain notation. */
  readonly exponent: number | null;
}

export interface NumberStyle {
  /** Decimals of the plain notation. */
  readonly decimals?: number;
  /** Significant digits, where no decimals are set. */
  readonly significant?: number;
  /** `+` is printed too, as for differences. */
  readonly signed?: boolean;
  /** Keep plain notation below 10⁻³, so that a column lines up. */
  readonly plain?: boolean;
}

const minus = '−';
const largestPlain = 1e7;
const smallestPlain = 1e-3;
/** toFixed gives up beyond this. */
const mostDecimals = 20;

export const grouped = (integer: string): string => (integer.length > 3 ? integer.replace(/\B(?=(\d{3})+(?!\d))/g, ',') : integer);

/** Power of ten of the first significant digit: 0.00055 → −4. */
export const exponentOf = (value: number): number => Number(value.toExponential().split('e')[1] ?? 0);

/** Decimals at which `significant` digits of the value are seen: (0.00055, 2) → 5. */
export const decimalsFor = (value: number, significant: number): number => Math.min(mostDecimals, Math.max(0, significant - 1 - exponentOf(value)));

function split(digits: string): { integer: string; fraction: string } {
  const [integer = '0', fraction = ''] = digits.split('.');
  return { integer: grouped(integer), fraction };
}

function signOf(value: number, printed: string, signed: boolean): NumberParts['sign'] {
  const isZero = !/[1-9]/.test(printed);
  if (isZero) return '';
  return value < 0 ? minus : signed ? '+' : '';
}

function scientific(value: number, significant: number, signed: boolean): NumberParts {
  const [mantissa = '0', power = '0'] = Math.abs(value).toExponential(significant - 1).split('e');
  return { sign: signOf(value, mantissa, signed), ...split(mantissa), exponent: Number(power) };
}

/** The shortest decimals that read back as the same double. */
function shortest(value: number, signed: boolean): NumberParts {
  const digits = String(Math.abs(value));
  if (digits.includes('e')) return scientific(value, digits.replace(/e.*$/, '').replace('.', '').length, signed);
  return { sign: signOf(value, digits, signed), ...split(digits), exponent: null };
}

/**
 * A finite number as parts; null for what is no number, which the caller prints as a word.
 * Below 10⁻³ and from 10⁷ on it is m × 10ⁿ, unless a column asks for plain decimals.
 */
export function numberParts(value: number, style: NumberStyle = {}): NumberParts | null {
  if (!Number.isFinite(value)) return null;
  const size = Math.abs(value);
  const signed = style.signed ?? false;
  const outside = size !== 0 && ((size < smallestPlain && !style.plain) || size >= largestPlain);
  if (size === 0 && style.decimals === undefined) return { sign: '', integer: '0', fraction: '', exponent: null };
  if (style.decimals === undefined && style.significant === undefined) {
    return outside ? scientific(value, significantDigits(value), signed) : shortest(value, signed);
  }
  if (outside) return scientific(value, style.significant ?? significantAt(size, style.decimals ?? 0), signed);
  const decimals = style.decimals ?? decimalsFor(size, style.significant ?? 1);
  const digits = size.toFixed(Math.min(mostDecimals, decimals));
  return { sign: signOf(value, digits, signed), ...split(digits), exponent: null };
}

const significantDigits = (value: number): number => Math.max(1, (Math.abs(value).toExponential().split('e')[0] ?? '').replace('.', '').length);

/** Digits left of a value printed to a number of decimals: at least one. */
const significantAt = (size: number, decimals: number): number => Math.min(17, Math.max(1, exponentOf(size) + 1 + decimals));

const superscripts: Record<string, string> = { '-': '⁻', '0': '⁰', '1': '¹', '2': '²', '3': '³', '4': '⁴', '5': '⁵', '6': '⁶', '7': '⁷', '8': '⁸', '9': '⁹' };
export const powerOfTen = (exponent: number): string => `10${[...String(exponent)].map((c) => superscripts[c] ?? c).join('')}`;

export function partsText(parts: NumberParts): string {
  const mantissa = parts.fraction ? `${parts.integer}.${parts.fraction}` : parts.integer;
  return `${parts.sign}${mantissa}${parts.exponent === null ? '' : ` × ${powerOfTen(parts.exponent)}`}`;
}

/** A computed value for a line of text: as many digits as it has, but none of the noise of binary fractions. */
export const readable = (value: number, most = 8): string => formatNumber(significantDigits(value) > most ? Number(value.toPrecision(most)) : value);

/** The number as one line of text: labels, readouts, anchors of threads. */
export function formatNumber(value: number | null, style: NumberStyle = {}): string {
  const parts = value === null ? null : numberParts(value, style);
  return parts ? partsText(parts) : 'unknown';
}
