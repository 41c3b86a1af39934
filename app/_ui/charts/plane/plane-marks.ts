import type { Figure, FigurePlane } from '@/lib/engine/contract/measurement';

/** Where a map lies on its sheet, in the sheet's own units. */
export interface PlaneFrame {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** One shade of the map: the levels it stands for, how strongly it is filled, and the cells that have it. */
export interface Shade {
  readonly from: number;
  readonly to: number;
  readonly opacity: number;
  readonly path: string;
}

export interface PlaneMarks {
  readonly shades: readonly Shade[];
  /** Where the level is the threshold; empty where it is nowhere. */
  readonly contour: string;
  readonly points: readonly { readonly x: number; readonly y: number }[];
  readonly toX: (value: number) => number;
  readonly toY: (value: number) => number;
}

/** One hue from pale to full: told apart by lightness alone, on light paper and on dark. */
const OPACITIES = [0.06, 0.16, 0.3, 0.5, 0.72, 0.95] as const;
const HALF = OPACITIES.length / 2;

const evenly = (low: number, high: number, parts: number): number[] => Array.from({ length: parts }, (_, i) => low + ((high - low) * i) / parts);

/** Half of the shades below the threshold, half above; all of them evenly where it is not crossed. */
export function boundaries({ level, threshold }: FigurePlane): number[] {
  const known = level.values.filter((v): v is number => v !== null);
  const low = known.reduce((a, b) => Math.min(a, b), Infinity);
  const high = known.reduce((a, b) => Math.max(a, b), -Infinity);
  if (!(high > low)) return [low, high];
  return threshold > low && threshold < high ? [...evenly(low, threshold, HALF), ...evenly(threshold, high, HALF), high] : [...evenly(low, high, 2 * HALF), high];
}

const at = (n: number): string => n.toFixed(2);

/** The four corners of a cell, or null where a level is missing. */
function cellOf({ level }: FigurePlane, columns: number, i: number, j: number): readonly [number, number, number, number] | null {
  const corner = (p: number, q: number) => level.values[q * columns + p] ?? null;
  const [a, b, c, d] = [corner(i, j), corner(i + 1, j), corner(i + 1, j + 1), corner(i, j + 1)];
  return a === null || b === null || c === null || d === null ? null : [a, b, c, d];
}

/** Segments of one cell on which the level is the threshold, by straight interpolation along its edges. */
function crossings(levels: readonly [number, number, number, number], threshold: number, xs: readonly [number, number], ys: readonly [number, number]): string {
  const corners = [[xs[0], ys[0]], [xs[1], ys[0]], [xs[1], ys[1]], [xs[0], ys[1]]] as const;
  const found: string[] = [];
  for (let k = 0; k < 4; k++) {
    const [p, q] = [levels[k] ?? 0, levels[(k + 1) % 4] ?? 0];
    const [from, to] = [corners[k], corners[(k + 1) % 4]];
    if (!from || !to || p >= threshold === q >= threshold) continue;
    const share = (threshold - p) / (q - p);
    found.push(`${at(from[0] + share * (to[0] - from[0]))} ${at(from[1] + share * (to[1] - from[1]))}`);
  }
  let path = '';
  for (let k = 0; k + 1 < found.length; k += 2) path += `M${found[k]}L${found[k + 1]}`;
  return path;
}

/** A plane as marks: shaded cells, the contour of its threshold, and the places that were computed. */
export function planeMarks(figure: Figure, plane: FigurePlane, frame: PlaneFrame): PlaneMarks {
  const [xs, ys] = [figure.x.values, plane.y.values];
  const across = (values: readonly number[]) => [values[0] ?? 0, values.at(-1) ?? 1] as const;
  const [[x0, x1], [y0, y1]] = [across(xs), across(ys)];
  const toX = (v: number): number => frame.left + ((v - x0) / (x1 - x0 || 1)) * frame.width;
  const toY = (v: number): number => frame.top + (1 - (v - y0) / (y1 - y0 || 1)) * frame.height;
  const steps = boundaries(plane);
  const paths = steps.slice(1).map(() => '');
  let contour = '';
  for (let j = 0; j + 1 < ys.length; j++)
    for (let i = 0; i + 1 < xs.length; i++) {
      const levels = cellOf(plane, xs.length, i, j);
      if (levels === null) continue;
      const [left, right, foot, head] = [toX(xs[i] ?? 0), toX(xs[i + 1] ?? 0), toY(ys[j] ?? 0), toY(ys[j + 1] ?? 0)];
      const mean = levels.reduce((sum, v) => sum + v, 0) / 4;
      const shade = Math.max(0, steps.findLastIndex((step, k) => k < paths.length && mean >= step));
      paths[shade] += `M${at(left)} ${at(foot)}H${at(right)}V${at(head)}H${at(left)}Z`;
      contour += crossings(levels, plane.threshold, [left, right], [foot, head]);
    }
  const opacity = (k: number): number => OPACITIES[paths.length === OPACITIES.length ? k : OPACITIES.length - 1] ?? 1;
  const points = figure.series.flatMap(({ values }) => values.flatMap((v, i) => (v === null ? [] : [{ x: toX(xs[i] ?? 0), y: toY(v) }])));
  return { shades: paths.map((path, k) => ({ from: steps[k] ?? 0, to: steps[k + 1] ?? 0, opacity: opacity(k), path })), contour, points, toX, toY };
}
