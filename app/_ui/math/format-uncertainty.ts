import { decimalsFor, exponentOf, formatNumber, powerOfTen } from './format-number';
import { unitText } from './units';

/** An uncertainty is rounded up, to two digits: a bar printed too short would say more than is known. */
export function roundUpUncertainty(u: number): number {
  if (!Number.isFinite(u) || u <= 0) return u;
  const power = exponentOf(u) - 1;
  const scaled = power < 0 ? u * 10 ** -power : u / 10 ** power;
  // The nudge keeps 2.0 from becoming 2.1 through the last bit of the division.
  const digits = Math.ceil(scaled - 1e-9);
  return Number(`${digits}e${power}`);
}

/**
 * Decimals at which a recomputed value is read against its claim: two digits of the tolerance, one
 * more than the author prints, enough that a difference is not shown as none; never finer than U.
 */
export function decimalsForReading(tolerance: number | null, printedDecimals: number, u: number | null, apart: number | null = null): number {
  const fromTolerance = tolerance !== null && tolerance > 0 ? decimalsFor(tolerance, 2) : 0;
  const fromApart = apart !== null && apart !== 0 && Number.isFinite(apart) ? decimalsFor(Math.abs(apart), 1) : 0;
  const wanted = Math.max(fromTolerance, fromApart, printedDecimals + 1);
  return u !== null && u > 0 ? Math.min(wanted, decimalsFor(u, 2)) : Math.min(wanted, Math.max(fromTolerance, printedDecimals + 1));
}

/** Digits after the point of a number as printed by its author: `0.9984(3)` → 4. */
export function printedDecimals(printed: string): number {
  const match = /^[^\d.]*[\d,]*(?:\.(\d*))?/.exec(printed.trim());
  const shift = /[eE×x]\s*(?:10\^?)?\s*([+\-−]?\d+)/.exec(printed);
  const decimals = (match?.[1] ?? '').length;
  return shift ? Math.max(0, decimals - Number((shift[1] ?? '0').replace('−', '-'))) : decimals;
}

const withUnit = (text: string, unit: string) => (unit ? `${text} ${unitText(unit)}` : text);

/** What a number is read against, in its own unit: where U lies far below, it needs no more digits than this. */
export interface ReadAgainst {
  readonly tolerance: number | null;
  readonly apart?: number | null;
}

/** Without the last bit of the product, which could make a tolerance of 0.1 one of two digits less. */
const scaled = (x: number | null | undefined, scale: number): number | null => (x === null || x === undefined ? null : Number((x * scale).toPrecision(12)));

/** The rule of the claim table; without a tolerance two digits of U. */
const decimalsAgainst = ({ tolerance, apart = null }: ReadAgainst, u: number): number =>
  tolerance === null || !(tolerance > 0) ? decimalsFor(u, 2) : decimalsForReading(tolerance, 0, u, apart);

/** Where no U bounds them, digits are those that the tolerance needs. */
const unboundedStyle = (value: number, against: ReadAgainst | undefined) =>
  against?.tolerance ? (Math.abs(value) < 1e-3 || Math.abs(value) >= 1e7 ? { significant: Math.max(2, exponentOf(value) - exponentOf(against.tolerance) + 2) } : { decimals: decimalsForReading(against.tolerance, 0, null, against.apart ?? null), plain: true }) : {};

/**
 * `36.297 ± 0.011 Mpc`; `(9.75 ± 0.20) × 10⁻⁵`; a tiny bar beside a plain value keeps its power of
 * ten: `0.91854503 ± 2.0 × 10⁻⁷`. What is not known is the word, never a zero. Read against a tolerance, `0.99323 ± 5.8 × 10⁻¹⁰`.
 */
export function formatWithUncertainty(value: number | null, uncertainty: number | null, unit = '', against?: ReadAgainst): string {
  if (value === null || !Number.isFinite(value)) return 'not computable';
  if (uncertainty === null || !Number.isFinite(uncertainty)) return `${withUnit(formatNumber(value, unboundedStyle(value, against)), unit)} ± unknown`;
  if (uncertainty <= 0) return `${withUnit(formatNumber(value, unboundedStyle(value, against)), unit)} ± 0`;
  const u = roundUpUncertainty(uncertainty);
  const size = Math.max(Math.abs(value), u);
  if (size < 1e-3 || size >= 1e7) return withUnit(sharedPower(value, u, exponentOf(size), against), unit);
  const decimals = against ? decimalsAgainst(against, u) : decimalsFor(u, 2);
  const bar = formatNumber(u, u < 1e-3 || decimals < decimalsFor(u, 2) ? { significant: 2 } : { decimals });
  return withUnit(`${formatNumber(value, { decimals, plain: true })} ± ${bar}`, unit);
}

function sharedPower(value: number, u: number, power: number, against: ReadAgainst | undefined): string {
  const fine = Math.max(0, power - (exponentOf(u) - 1));
  const scale = 10 ** -power;
  const decimals = Math.min(fine, decimalsAgainst({ tolerance: scaled(against?.tolerance, scale), apart: scaled(against?.apart, scale) }, u * scale));
  if (decimals < fine) return `${formatNumber(value * scale, { decimals, plain: true })} × ${powerOfTen(power)} ± ${formatNumber(u, { significant: 2 })}`;
  const mantissa = formatNumber(value * scale, { decimals, plain: true });
  return `(${mantissa} ± ${formatNumber(u * scale, { decimals, plain: true })}) × ${powerOfTen(power)}`;
}
