import type { MatchBounds } from './pair-bound';

/** What the bins of a scan, and those on which the best match is read, may differ by. */
const ROOM = 2e-4;

const angleOf = (match: number): number => Math.acos(Math.min(1, Math.max(-1, match)));

/** Grid points of one template between two that were looked at. */
interface Gap {
  readonly template: number;
  /** Places in the grid; −1 and its length stand beyond its ends. */
  readonly left: number;
  readonly right: number;
  /** Angles at both, none smaller; infinite beyond the ends. */
  readonly a: number;
  readonly b: number;
  /** No mass in the gap makes a smaller angle. */
  readonly angle: number;
}

const lengthOf = (path: Float64Array, left: number, right: number): number => path[Math.min(path.length - 1, right)]! - path[Math.max(0, left)]!;

/** By the triangle inequality: an angle changes along the path by no more than the path is long. */
function gapOf(template: number, path: Float64Array, left: number, right: number, a: number, b: number): Gap {
  const length = lengthOf(path, left, right);
  const angle = left < 0 ? b - length : right >= path.length ? a - length : (a + b - length) / 2;
  return { template, left, right, a, b, angle };
}

/** The grid point in the middle of the stretch that the looks at both ends leave open for angles below `least`; −1 when all were looked at. */
function nextIn(path: Float64Array, { left, right, a, b }: Gap, least: number): number {
  if (right - left < 2) return -1;
  const length = lengthOf(path, left, right);
  const from = left < 0 ? 0 : Math.max(0, a - least);
  const to = right >= path.length ? length : Math.min(length, length - (b - least));
  const wanted = path[Math.max(0, left)]! + (from + to) / 2;
  let best = left + 1;
  for (let g = left + 2; g < right; g++) if (Math.abs(path[g]! - wanted) < Math.abs(path[best]! - wanted)) best = g;
  return best;
}

/** Gaps by their angle, the least first. */
class Heap {
  private readonly gaps: Gap[] = [];

  push(gap: Gap): void {
    const { gaps } = this;
    let i = gaps.length;
    gaps.push(gap);
    for (let up = (i - 1) >> 1; i > 0 && gaps[up]!.angle > gap.angle; i = up, up = (i - 1) >> 1) gaps[i] = gaps[up]!;
    gaps[i] = gap;
  }

  pop(): Gap | undefined {
    const { gaps } = this;
    const [first, last] = [gaps[0], gaps.pop()];
    if (last === undefined || gaps.length === 0) return first;
    let i = 0;
    for (;;) {
      let down = 2 * i + 1;
      if (down >= gaps.length) break;
      if (down + 1 < gaps.length && gaps[down + 1]!.angle < gaps[down]!.angle) down++;
      if (gaps[down]!.angle >= last.angle) break;
      gaps[i] = gaps[down]!;
      i = down;
    }
    gaps[i] = last;
    return first;
  }
}

/**
 * Looks at the grid points beside which the best match could lie, and at no others.
 * Shape:  paths by template, angles along the grid of masses; bounds of the match where asked. Gives [template][factor], 0 where no
 *         match between the neighbours can be the best.
 * Units:  matches.
 * Error:  none: arccos of a match that is maximised over shifts and phases is a distance, and a template moves no farther than its path.
 * Fails:  never; bounds that are not finite leave nothing out.
 * Source: triangle inequality; best-first search of a function whose slope is bounded (common practice).
 */
export function promising(paths: readonly Float64Array[], look: (template: number, g: number) => MatchBounds, everywhere = false): Float32Array {
  const factors = paths[0]?.length ?? 0;
  const [seen, live] = [new Float32Array(paths.length * factors), new Float32Array(paths.length * factors)];
  let best = 0;
  const lookAt = (t: number, g: number): number => {
    const { least, most } = look(t, g);
    best = Math.max(best, least);
    seen[t * factors + g] = least;
    return most >= 0 ? angleOf(most) : 0;
  };
  if (everywhere) {
    paths.forEach((_, t) => { for (let g = 0; g < factors; g++) lookAt(t, g); });
    return seen;
  }
  const heap = new Heap();
  const add = (t: number, left: number, right: number, a: number, b: number): void => heap.push(gapOf(t, paths[t]!, left, right, a, b));
  const split = (t: number, g: number, left: number, right: number, a: number, b: number): void => {
    const angle = lookAt(t, g);
    add(t, left, g, a, angle);
    add(t, g, right, angle, b);
  };
  paths.forEach((_, t) => { split(t, factors >> 1, -1, factors, Infinity, Infinity); });
  for (let gap = heap.pop(); gap !== undefined && !(gap.angle > angleOf(best - ROOM)); gap = heap.pop()) {
    const { template: t, left, right, a, b } = gap;
    const next = nextIn(paths[t]!, gap, angleOf(best - ROOM));
    if (next >= 0) split(t, next, left, right, a, b);
    else for (const g of [left, right]) if (g >= 0 && g < factors) live[t * factors + g] = seen[t * factors + g]!;
  }
  return live;
}
