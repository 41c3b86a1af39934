import type { Finding } from '@/lib/engine/contract/finding';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import { curveIdentity } from '@/lib/engine/findings/curve-identity';
import { err, ok, type Result } from '@/lib/kernel/result';
import { isInside } from './built-in-curves';

export type NoiseMeaning = 'asd' | 'psd' | 'characteristic';

export interface NoiseTable {
  readonly name: string;
  readonly f: ArrayLike<number>;
  readonly values: ArrayLike<number>;
  readonly meaning: NoiseMeaning;
  readonly sided: 'one' | 'two';
  /** Where a row stands, e.g. its file and line; by default the row's number counted from 1. */
  readonly whereRow?: (index: number) => string;
  /** What is written on it; where it is given, the curve is compared with the published ones. */
  readonly writing?: readonly string[];
}

export interface TabulatedCurve {
  readonly curve: NoiseCurve;
  readonly findings: readonly Finding[];
}

const pointsAnOctave = 5;
/** More would bury the cause: a file in the wrong column is invalid in every row. */
const maxReported = 20;

/**
 * An uploaded noise table as the engine's curve: ln S is linear in ln f between points.
 * Shape:  f and values are parallel, at least two rows; psd takes and returns a scalar.
 * Units:  f in Hz; values in Hz^-1/2 (asd), 1/Hz (psd) or dimensionless (characteristic); psd() in 1/Hz, one-sided.
 * Error:  none beyond rounding: the interpolation is the definition (settings.md rule 2.5).
 * Fails:  `engine/curve-invalid` for every row that is not finite, not positive or not rising (first twenty);
 *         psd is NaN outside the table (fails closed).
 * Source: settings.md rule 2.5; domain reference C01, C02, V19.
 */
export function tabulatedCurve(table: NoiseTable): Result<TabulatedCurve, Finding[]> {
  const problems = invalidRows(table);
  if (problems.length > 0) return err(problems);
  const f = Float64Array.from(table.f);
  const s = Float64Array.from(table.values, (value, i) => oneSidedPower(value, f[i]!, table));
  const psd = logLogInterpolation(f, s);
  const found = [coarseFinding(table, f, s), table.writing === undefined ? null : curveIdentity({ name: table.name, f, psd: s, writing: table.writing })];
  return ok({
    curve: {
      name: table.name,
      builtIn: null,
      fLowHz: f[0]!,
      fHighHz: f[f.length - 1]!,
      psd,
      points: f,
      alreadyAveraged: false,
      source: `table of ${f.length} points, ${table.meaning}, ${table.sided}-sided, as attached`,
    },
    findings: found.filter((finding) => finding !== null),
  });
}

function oneSidedPower(value: number, fHz: number, table: Pick<NoiseTable, 'meaning' | 'sided'>): number {
  const power = table.meaning === 'psd' ? value : table.meaning === 'asd' ? value * value : (value * value) / fHz;
  return table.sided === 'two' ? 2 * power : power;
}

function invalidRows(table: NoiseTable): Finding[] {
  const n = table.f.length;
  const found: Finding[] = [];
  const add = (where: string, text: string) => {
    if (found.length < maxReported)
      found.push({ code: 'engine/curve-invalid', level: 'stops-lodging', where, text, fix: 'Correct the row or attach another curve.' });
  };
  if (n !== table.values.length) add(table.name, `The curve has ${n} frequencies and ${table.values.length} values.`);
  else if (n < 2) add(table.name, `The curve has ${n} point${n === 1 ? '' : 's'}; at least two are needed.`);
  else for (let i = 0; i < n; i++) for (const text of rowProblems(table, i)) add(rowPlace(table, i), text);
  return found;
}

const rowPlace = (table: NoiseTable, i: number): string => table.whereRow?.(i) ?? `${table.name}, row ${i + 1}`;

function rowProblems(table: NoiseTable, i: number): string[] {
  const f = table.f[i]!;
  const value = table.values[i]!;
  const problems: string[] = [];
  if (!Number.isFinite(f) || f <= 0) problems.push(`The frequency is ${f}; it must be a positive number of Hz.`);
  else if (i > 0 && !(f > table.f[i - 1]!))
    problems.push(`The frequency goes from ${table.f[i - 1]} to ${f} Hz; it must rise from row to row.`);
  if (!Number.isFinite(value) || value <= 0) problems.push(`The noise value is ${value}; it must be positive.`);
  else if (f > 0 && !isPositiveFinite(oneSidedPower(value, f, table)))
    problems.push(`The noise value ${value} as ${table.meaning} gives a power density outside the range of double precision.`);
  return problems;
}

const isPositiveFinite = (x: number): boolean => Number.isFinite(x) && x > 0;

/** Fewer than five points an octave between neighbours that differ: the rule between points then shows in the number. */
function coarseFinding(table: NoiseTable, f: Float64Array, s: Float64Array): Finding | null {
  let widest = -1;
  let gaps = 0;
  for (let i = 1; i < f.length; i++) {
    if (s[i] === s[i - 1] || !(octaves(f, i) > (1 + 1e-9) / pointsAnOctave)) continue;
    gaps++;
    if (widest < 0 || octaves(f, i) > octaves(f, widest)) widest = i;
  }
  if (widest < 0) return null;
  const density = 1 / octaves(f, widest);
  return {
    code: 'engine/curve-coarse',
    level: 'worth-a-look',
    where: rowPlace(table, widest),
    text: `${gaps} of ${f.length - 1} steps hold fewer than ${pointsAnOctave} points an octave; the widest goes from ${f[widest - 1]} to ${f[widest]} Hz (${density.toPrecision(2)} points an octave). There the value depends on how the curve is interpolated.`,
    fix: 'Attach the curve with more points, or name a built-in curve.',
  };
}

const octaves = (f: Float64Array, i: number): number => Math.log2(f[i]! / f[i - 1]!);

/** Route sums walk upwards in f, so the segment of the last call is tried first, then its neighbour. */
function logLogInterpolation(f: Float64Array, s: Float64Array): (fHz: number) => number {
  const lnF = f.map(Math.log);
  const lnS = s.map(Math.log);
  const last = f.length - 2;
  let k = 0;
  return (fHz) => {
    if (!isInside(fHz, f[0]!, f[last + 1]!)) return Number.NaN;
    if (fHz < f[k]! || fHz > f[k + 1]!) {
      if (k < last && fHz >= f[k + 1]! && fHz <= f[k + 2]!) k++;
      else k = segmentOf(f, fHz);
    }
    const t = (Math.log(fHz) - lnF[k]!) / (lnF[k + 1]! - lnF[k]!);
    return Math.exp(lnS[k]! + t * (lnS[k + 1]! - lnS[k]!));
  };
}

function segmentOf(f: Float64Array, fHz: number): number {
  let low = 0;
  let high = f.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (f[middle]! <= fHz) low = middle;
    else high = middle;
  }
  return low;
}
