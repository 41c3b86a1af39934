import { isEnough, isNamed, median, pointsAgainst, SAME, type Point, type UploadedCurve } from '../noise/beside-built-in';
import { builtInCurves, type BuiltInCurve } from '../noise/built-in-curves';
import { short } from '../findings/spelt';

export type NoiseMeaning = 'asd' | 'psd' | 'characteristic';
export const noiseMeanings: readonly NoiseMeaning[] = ['asd', 'psd', 'characteristic'];

/** An uploaded column as it stands in the file, with what the sheet says of it. */
export interface NoiseColumn {
  readonly name: string;
  readonly f: Float64Array;
  readonly values: Float64Array;
  readonly meaning: NoiseMeaning;
  readonly sided: 'one' | 'two';
  readonly writing: readonly string[];
}

/** One reading of the column under which it is a built-in curve times a number. */
export interface CurveFit {
  readonly known: BuiltInCurve;
  readonly named: boolean;
  readonly meaning: NoiseMeaning;
  /** Power density of the column over that of the curve. */
  readonly power: 1 | 2 | 0.5;
  readonly angular: boolean;
  /** Furthest of the octaves' medians from that factor, as ln of amplitudes. */
  readonly off: number;
  /** Ratios of amplitude densities in five octaves, in words. */
  readonly inOctaves: string;
}

/** More points say no more about a smooth curve. */
const MOST_POINTS = 800;
const OCTAVES = 5;
/** Another fit or a digitised print of a curve stays within this; √2 lies far outside. */
export const NEAR = 0.08;

/** The column thinned to what is looked at. */
export function thinned({ f, values, ...rest }: NoiseColumn): NoiseColumn {
  const stride = Math.ceil(f.length / MOST_POINTS);
  const kept = (column: Float64Array): Float64Array => (stride === 1 ? column : column.filter((_, i) => i % stride === 0));
  return { ...rest, f: kept(f), values: kept(values) };
}

/** As one-sided power density, if the column meant this. */
export const readAs = ({ name, f, values, writing }: NoiseColumn, meaning: NoiseMeaning): UploadedCurve => ({
  name,
  f,
  psd: values.map((v, i) => (meaning === 'psd' ? v : meaning === 'asd' ? v * v : (v * v) / f[i]!)),
  writing,
});

interface OctaveMedian {
  readonly fromHz: number;
  readonly ln: number;
}

/** Median ratio in five octaves spread over the common range; fewer where it is narrower. */
function inFive(points: readonly Point[]): OctaveMedian[] {
  const [first, last] = [points[0]!.fHz, points[points.length - 1]!.fHz];
  const all = Math.max(1, Math.floor(Math.log2(last / first) + 1e-9));
  const count = Math.min(OCTAVES, all);
  return Array.from({ length: count }, (_, k) => first * 2 ** (count === 1 ? 0 : Math.round((k * (all - 1)) / (count - 1)))).flatMap((fromHz) => {
    const inside = points.filter(({ fHz }) => fHz >= fromHz && fHz < 2 * fromHz).map(({ apart }) => apart);
    return inside.length === 0 ? [] : [{ fromHz, ln: median(inside) }];
  });
}

function spell(five: readonly OctaveMedian[], turn: number): string {
  const ratios = five.map(({ ln }) => `×${short(Math.exp(ln))}`);
  const from = five.map(({ fromHz }) => short(fromHz / turn));
  const alike = ratios.length > 1 && ratios.every((ratio) => ratio === ratios[0]);
  return alike ? `${ratios[0]} in each of the octaves from ${from.slice(0, -1).join(', ')} and ${from.at(-1)} Hz` : ratios.map((ratio, i) => `${ratio} from ${from[i]} Hz`).join(', ');
}

function fitTo(column: NoiseColumn, meaning: NoiseMeaning, known: BuiltInCurve, named: boolean, angular: boolean): CurveFit | null {
  const turn = angular ? 2 * Math.PI : 1;
  const points = pointsAgainst(readAs(column, meaning), known, (x) => x / turn);
  if (!isEnough(points)) return null;
  const five = inFive(points);
  // A density per rad/s is 2π times smaller than one per Hz.
  const [power, off] = ([1, 2, 0.5] as const)
    .map((factor) => [factor, Math.min(...[1, angular ? 1 / turn : 1].map((per) => Math.max(...five.map(({ ln }) => Math.abs(ln - Math.log(factor * per) / 2)))))] as const)
    .reduce((p, q) => (q[1] < p[1] ? q : p));
  return off <= NEAR ? { known, named, meaning, power, angular, off, inOctaves: spell(five, turn) } : null;
}

/**
 * The reading under which a column is a built-in curve: its meaning, its sides, and whether its first column is ω.
 * Shape:  a table of rising frequencies and positive values.
 * Units:  Hz and the column's own unit.
 * Error:  octave medians within 8 % of the curve.
 * Fails:  null where fewer than three octaves are shared or no reading fits.
 * Source: domain reference, 4.2 and conventions C01, C02, C36.
 */
export function fitCurve(column: NoiseColumn): CurveFit | null {
  const named = builtInCurves.filter((known) => isNamed(readAs(column, 'psd'), known));
  const fits = [false, true].flatMap((angular) =>
    noiseMeanings.flatMap((meaning) => builtInCurves.flatMap((known) => fitTo(column, meaning, known, named.includes(known), angular) ?? [])),
  );
  // A curve that the file names goes before one that is as near; a factor of one before another.
  const worth = ({ off, named: said, power }: CurveFit): number => Math.max(off, SAME) - (said ? NEAR : 0) + (power === 1 ? 0 : SAME / 2);
  return fits.reduce<CurveFit | null>((p, q) => (p === null || worth(q) < worth(p) ? q : p), null);
}

export interface SizeAndSlope {
  /** Median of the logarithm to base ten. */
  readonly size: number;
  /** d ln(column)/d ln f over the highest octave. */
  readonly slope: number;
  readonly ground: boolean;
}

/** Size and slope of the column as it stands; null where it spans less than two octaves. */
export function sizeAndSlope({ f, values }: NoiseColumn): SizeAndSlope | null {
  const last = f.length - 1;
  const from = f.findIndex((x) => x >= f[last]! / 2);
  if (last < 8 || f[last]! / f[0]! < 4 || from >= last) return null;
  // Each decade of frequency counts alike, however its points lie.
  const even = Array.from({ length: 101 }, (_, k) => f[0]! * (f[last]! / f[0]!) ** (k / 100)).map((x) => Math.log10(values[Math.min(last, f.findIndex((y) => y >= x * (1 - 1e-9)))]!));
  return { size: median(even), slope: Math.log(values[last]! / values[from]!) / Math.log(f[last]! / f[from]!), ground: Math.sqrt(f[0]! * f[last]!) >= 1 };
}
