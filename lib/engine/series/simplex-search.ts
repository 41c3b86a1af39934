export interface Maximum {
  readonly at: readonly number[];
  readonly value: number;
}

interface Vertex {
  readonly at: readonly number[];
  readonly value: number;
}

/** Edge length below which the simplex stops and the number of evaluations after which it gives up. */
interface Limits {
  readonly tolerance: number;
  readonly evaluations: number;
}

/**
 * Climbs to a local maximum of a few parameters.
 * Shape:  `start` and `steps` are parallel; parameters are unbounded, so callers fold bounds into f.
 * Units:  those of f's parameters; the tolerance is in units of the steps.
 * Error:  parameters to tolerance × step; the value quadratically better.
 * Fails:  never; returns the best point seen.
 * Source: Nelder & Mead 1965 (from memory), standard coefficients.
 */
export function climbSimplex(
  f: (at: readonly number[]) => number,
  start: readonly number[],
  steps: readonly number[],
  limits: Limits,
): Maximum {
  const vertexAt = (at: readonly number[]): Vertex => ({ at, value: f(at) });
  let simplex = [vertexAt(start), ...start.map((_, i) => vertexAt(start.map((x, j) => (j === i ? x + steps[i]! : x))))];
  let used = simplex.length;
  const sorted = (vertices: Vertex[]): Vertex[] => [...vertices].sort((p, q) => q.value - p.value);
  simplex = sorted(simplex);
  const mix = (from: readonly number[], to: readonly number[], share: number): number[] => from.map((x, i) => x + share * (to[i]! - x));
  while (used < limits.evaluations) {
    const best = simplex[0]!;
    const worst = simplex[simplex.length - 1]!;
    const size = Math.max(...simplex.slice(1).map((v) => Math.max(...v.at.map((x, i) => Math.abs(x - best.at[i]!) / steps[i]!))));
    if (size < limits.tolerance) break;
    const kept = simplex.slice(0, -1);
    const centre = start.map((_, i) => kept.reduce((sum, v) => sum + v.at[i]!, 0) / kept.length);
    const reflected = vertexAt(mix(centre, worst.at, -1));
    used++;
    if (reflected.value > best.value) {
      const further = vertexAt(mix(centre, worst.at, -2));
      used++;
      simplex = sorted([...kept, further.value > reflected.value ? further : reflected]);
    } else if (reflected.value > kept[kept.length - 1]!.value) {
      simplex = sorted([...kept, reflected]);
    } else {
      const nearer = vertexAt(mix(centre, reflected.value > worst.value ? reflected.at : worst.at, 0.5));
      used++;
      if (nearer.value > Math.max(worst.value, reflected.value)) simplex = sorted([...kept, nearer]);
      else {
        simplex = sorted([best, ...simplex.slice(1).map((v) => vertexAt(mix(best.at, v.at, 0.5)))]);
        used += start.length;
      }
    }
  }
  return simplex[0]!;
}
