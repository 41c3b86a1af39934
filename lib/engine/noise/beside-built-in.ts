import { short } from '../findings/spelt';
import type { BuiltInCurve } from './built-in-curves';

/** An uploaded curve as one-sided power density at its own points, and what is written on it. */
export interface UploadedCurve {
  readonly name: string;
  readonly f: ArrayLike<number>;
  readonly psd: ArrayLike<number>;
  /** Its name in the sheet, its file's name and the comment lines of the file. */
  readonly writing: readonly string[];
}

/** Amplitude densities closer than this are the same curve printed. */
export const SAME = 0.005;
/** Differences that are spoken of. */
export const APART = 0.03;
/** Fits of a published curve stay further away; printed copies of one, nearer. */
const COPIED = 3e-4;
/** So many octaves copied in one piece are no accident. */
export const LEAST_SAME = 2;
/** And so many octaves must be apart before anything is asked. */
export const LEAST_APART = 0.25;
/** A relation that holds everywhere must hold over this many octaves. */
const LEAST_RELATED = 3;
/** At this many points, however wide the octaves that they stand for: a few agree by chance. */
export const LEAST_POINTS = 12;

export interface Point {
  readonly fHz: number;
  /** Width in octaves that the point stands for. */
  readonly width: number;
  /** ln of the amplitude density over that of the built-in curve. */
  readonly apart: number;
}

/** More points than these say no more about a smooth curve. */
const MOST_POINTS = 4000;

/**
 * The uploaded points inside a built-in curve's range; `read` says at which frequency the latter is asked.
 * Shape:  one point a row of the curve, of more than 4000 rows every so many.
 * Units:  f in Hz, psd in 1/Hz; `apart` is ln of a ratio of amplitude densities.
 * Error:  rounding.
 * Fails:  empty where the curve lies outside the range.
 * Source: domain reference 4.2, V20 and C40.
 */
export function pointsAgainst({ f, psd }: UploadedCurve, curve: BuiltInCurve, read: (fHz: number) => number = (x) => x): Point[] {
  const points: Point[] = [];
  const stride = Math.ceil(f.length / MOST_POINTS);
  for (let i = 0; i < f.length; i += stride) {
    const at = read(f[i]!);
    if (at < curve.fLowHz || at > curve.fHighHz) continue;
    const [below, above] = [f[Math.max(0, i - stride)]!, f[Math.min(f.length - 1, i + stride)]!];
    points.push({ fHz: f[i]!, width: Math.log2(above / below) / 2, apart: Math.log(psd[i]! / curve.psd(at)) / 2 });
  }
  return points;
}

export const isEnough = (points: readonly Point[]): boolean => points.length >= LEAST_POINTS && octaves(points) >= LEAST_RELATED;

export const octaves = (points: readonly Point[]): number => points.reduce((sum, { width }) => sum + width, 0);

/** Octaves of the longest piece in which every point is copied. */
export function longestSame(points: readonly Point[]): number {
  let [best, here] = [0, 0];
  for (const { width, apart } of points) {
    here = Math.abs(apart) < COPIED ? here + width : 0;
    if (here > best) best = here;
  }
  return best;
}

export const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1] ?? Number.NaN;

/** Is the amplitude density that of the built-in curve times one number? */
export function constantRatio(points: readonly Point[]): number | null {
  if (!isEnough(points)) return null;
  const middle = median(points.map(({ apart }) => apart));
  return points.every(({ apart }) => Math.abs(apart - middle) < SAME) ? Math.exp(middle) : null;
}

const spread = (values: readonly number[]): boolean => values.length > 0 && values.every((x) => Math.abs(x) < SAME);

/**
 * S taken for its root or the other way round: the column was read as another density.
 * Shape:  a curve and a built-in one that share three octaves.
 * Units:  psd in 1/Hz, as read.
 * Error:  half a per cent of the amplitude density, at every point.
 * Fails:  null where neither is so.
 * Source: domain reference 4.2, V20 and C40.
 */
export function densityMistaken(curve: UploadedCurve, known: BuiltInCurve): string | null {
  const points = pointsAgainst(curve, known);
  if (!isEnough(points)) return null;
  const lnKnown = points.map(({ fHz }) => Math.log(known.psd(fHz)));
  const lnHere = points.map(({ apart }, i) => 2 * apart + lnKnown[i]!);
  if (spread(lnHere.map((x, i) => x - lnKnown[i]! / 2))) return 'is the square root of it: an amplitude density read as a power density?';
  if (spread(lnHere.map((x, i) => (x - 2 * lnKnown[i]!) / 2))) return 'is the square of it: a power density read as an amplitude density?';
  return null;
}

export const angular = (curve: UploadedCurve, known: BuiltInCurve): boolean => {
  const points = pointsAgainst(curve, known, (x) => x / (2 * Math.PI));
  return isEnough(points) && spread(points.map(({ apart }) => apart));
};

export interface Octave {
  readonly fromHz: number;
  readonly toHz: number;
  readonly ratio: number;
}

/**
 * Median ratio octave by octave, neighbours that agree drawn together.
 * Shape:  at least one point, frequencies rising.
 * Units:  Hz; ratios of amplitude densities.
 * Error:  the median of each octave.
 * Fails:  never; octaves without a point are left out.
 * Source: domain reference 4.2, V20 and C40.
 */
export function byOctave(points: readonly Point[]): Octave[] {
  const found: Octave[] = [];
  const first = points[0]!.fHz;
  const count = Math.max(1, Math.ceil(Math.log2(points[points.length - 1]!.fHz / first) - 1e-9));
  for (let k = 0; k < count; k++) {
    const [from, to] = [first * 2 ** k, first * 2 ** (k + 1)];
    const inside = points.filter(({ fHz }) => fHz >= from && (fHz < to || k === count - 1));
    if (inside.length === 0) continue;
    const ratio = Math.exp(median(inside.map(({ apart }) => apart)));
    const before = found[found.length - 1];
    const alike = before !== undefined && short(before.ratio) === short(ratio);
    const agree = before !== undefined && Math.abs(Math.log(before.ratio)) < SAME && Math.abs(Math.log(ratio)) < SAME;
    const toHz = Math.min(to, points[points.length - 1]!.fHz);
    if (alike || agree) found[found.length - 1] = { ...before, toHz };
    else found.push({ fromHz: from, toHz, ratio });
  }
  return found;
}

/** Does the writing on it name this curve: by its title, or by its id? Ids such as A1 stand for much else and count in brackets or after "curve" only. */
export function isNamed({ writing }: UploadedCurve, { id, title }: BuiltInCurve): boolean {
  const plain = (text: string): string => text.toLowerCase().replace(/[^a-z0-9]+/g, ' ');
  const marked = new RegExp(`(\\(|\\bcurve )${id}\\b`);
  const alone = new RegExp(`(^|[\\s"'/])${id}([\\s"'.,;:/]|$)`);
  return writing.some((line) => marked.test(line) || plain(line).includes(plain(title).trim()) || (/^[GS]/.test(id) && alone.test(line)));
}
