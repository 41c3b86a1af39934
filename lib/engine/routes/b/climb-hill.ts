const GOLDEN = (Math.sqrt(5) - 1) / 2;

export interface Summit {
  readonly x: readonly number[];
  readonly value: number;
}

/**
 * Golden section for one variable between two bounds; the ends count too.
 * Shape:  one place and the value there.
 * Units:  those of the variable; so is the tolerance.
 * Error:  the place to the tolerance, on a hill without a second top.
 * Fails:  never.
 * Source: Kiefer 1953 (from memory).
 */
export function goldenMaximum(f: (x: number) => number, low: number, high: number, tolerance: number): Summit {
  let [a, b] = [low, high];
  let [c, d] = [b - GOLDEN * (b - a), a + GOLDEN * (b - a)];
  let [fc, fd] = [f(c), f(d)];
  while (b - a > tolerance) {
    if (fc >= fd) {
      [b, d, fd] = [d, c, fc];
      c = b - GOLDEN * (b - a);
      fc = f(c);
    } else {
      [a, c, fc] = [c, d, fd];
      d = a + GOLDEN * (b - a);
      fd = f(d);
    }
  }
  const tried = [{ x: [c], value: fc }, { x: [d], value: fd }, { x: [low], value: f(low) }, { x: [high], value: f(high) }];
  return tried.reduce((best, next) => (next.value > best.value ? next : best));
}

interface Corner {
  readonly x: number[];
  readonly value: number;
}

const along = (from: readonly number[], to: readonly number[], share: number): number[] => from.map((x, i) => x + share * (to[i]! - x));

/**
 * Downhill simplex turned uphill, for two or three variables.
 * Shape:  `steps` spans the first simplex; `into` keeps points inside their bounds.
 * Units:  those of the variables.
 * Error:  stops when every edge is shorter than `tolerance`; the value is then off by its square.
 * Fails:  never; at most 400 evaluations.
 * Source: Nelder & Mead 1965 [from memory].
 */
export function simplexMaximum(f: (x: readonly number[]) => number, start: readonly number[], steps: readonly number[], into: (x: number[]) => number[], tolerance: number): Summit {
  let evaluations = 0;
  const corner = (x: number[]): Corner => {
    const inside = into(x);
    evaluations++;
    return { x: inside, value: f(inside) };
  };
  let corners = [corner([...start]), ...steps.map((step, i) => corner(start.map((x, j) => (i === j ? x + step : x))))];
  const size = (): number => Math.max(...corners.flatMap((p) => p.x.map((x, i) => Math.abs(x - corners[0]!.x[i]!))));
  do {
    corners.sort((p, q) => q.value - p.value);
    const worst = corners[corners.length - 1]!;
    const kept = corners.slice(0, -1);
    const centre = start.map((_, i) => kept.reduce((sum, p) => sum + p.x[i]!, 0) / kept.length);
    const reflected = corner(along(worst.x, centre, 2));
    const further = reflected.value > corners[0]!.value ? corner(along(worst.x, centre, 3)) : null;
    const better = further !== null && further.value > reflected.value ? further : reflected;
    const secondWorst = kept[kept.length - 1]!;
    const inner = better.value > secondWorst.value ? better : corner(along(worst.x, centre, reflected.value > worst.value ? 1.5 : 0.5));
    corners = inner.value > worst.value ? [...kept, inner] : corners.map((p, i) => (i === 0 ? p : corner(along(corners[0]!.x, p.x, 0.5))));
  } while (size() > tolerance && evaluations < 400);
  corners.sort((p, q) => q.value - p.value);
  return corners[0]!;
}
