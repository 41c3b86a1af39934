import type { DetectorRoute, Sight, SightMatch } from '@/lib/engine/contract/route';
import { goldenMaximum, simplexMaximum } from '@/lib/engine/routes/b/climb-hill';
import { climbSimplex } from '@/lib/engine/series/simplex-search';
import { legendreRule } from './loudness';
import type { SightProblem } from './sight-problem';

/** Angles that are fixed; null is gone over. */
export interface Range {
  readonly inclinationRad: number | null;
  readonly azimuthRad: number | null;
}

export interface Weighed {
  readonly sight: Sight;
  readonly share: number;
  readonly match: SightMatch;
}

/** Each route goes over the sights on a grid of its own. */
interface Grid {
  readonly inclinations: number;
  readonly azimuths: number;
  readonly firstAzimuth: number;
  readonly legendre: number;
}
const grids: Readonly<Record<DetectorRoute['name'], Grid>> = {
  A: { inclinations: 19, azimuths: 24, firstAzimuth: 0, legendre: 16 },
  B: { inclinations: 16, azimuths: 30, firstAzimuth: 0.5, legendre: 21 },
};
/** The same sums on three quarters as many sights say what the mean leaves open. */
const thinner = ({ legendre, azimuths, ...rest }: Grid): Grid => ({ ...rest, legendre: (legendre * 3) / 4, azimuths: (azimuths * 3) / 4 });

const FARTHEST = Math.PI / 2;
const KEPT = 2;
const REFINED = 1e-5;

/** Past the pole a sight comes back on the other side; past edge-on the search turns round. */
function folded(inclinationRad: number): number {
  const away = Math.abs(inclinationRad) % (2 * FARTHEST);
  return away > FARTHEST ? 2 * FARTHEST - away : away;
}

const azimuthsOf = ({ azimuths, firstAzimuth }: Grid): number[] => Array.from({ length: azimuths }, (_, i) => (2 * Math.PI * (i + firstAzimuth)) / azimuths);

function refined(name: DetectorRoute['name'], match: (sight: Sight) => number, start: Sight, { inclinationRad, azimuthRad }: Range, grid: Grid): Sight {
  const azimuthStep = Math.PI / grid.azimuths;
  const inclinationStep = FARTHEST / (2 * grid.inclinations);
  const over = [
    ...(azimuthRad === null ? [{ from: start.azimuthRad, step: azimuthStep }] : []),
    ...(inclinationRad === null ? [{ from: start.inclinationRad, step: inclinationStep }] : []),
  ];
  const sightAt = (x: readonly number[]): Sight => ({
    azimuthRad: azimuthRad ?? x[0]!,
    inclinationRad: inclinationRad ?? folded(x[x.length - 1]!),
  });
  const from = over.map((one) => one.from);
  const steps = over.map((one) => one.step);
  const less = (x: readonly number[]): number => -match(sightAt(x));
  if (name === 'A') return sightAt(climbSimplex(less, from, steps, { tolerance: 4 * REFINED, evaluations: 120 * over.length }).at);
  if (over.length === 1) return sightAt(goldenMaximum((x) => less([x]), from[0]! - 2 * steps[0]!, from[0]! + 2 * steps[0]!, REFINED).x);
  return sightAt(simplexMaximum(less, from, steps, (x) => x, REFINED).x);
}

/**
 * The least match over the sights that are not fixed: a grid, then its two lowest places refined.
 * Shape:  one sight with its match.
 * Units:  radians.
 * Error:  angles to 1e-5, which enters squared.
 * Fails:  NaN when no sight has a match.
 * Source: settings.md sections 3 and 4 (Q11, Q26): inclinations 0, 5, … 90° for route A, every 6° for route B.
 */
export function leastMatch({ route, matcher }: SightProblem, range: Range): { sight: Sight; match: SightMatch } {
  const grid = grids[route.name];
  const inclinations = range.inclinationRad === null ? Array.from({ length: grid.inclinations }, (_, i) => (FARTHEST * i) / (grid.inclinations - 1)) : [range.inclinationRad];
  const azimuths = range.azimuthRad === null ? azimuthsOf(grid) : [range.azimuthRad];
  const seen = inclinations.flatMap((inclinationRad) =>
    // From the pole an azimuth only turns what is seen.
    (inclinationRad === 0 ? azimuths.slice(0, 1) : azimuths).map((azimuthRad) => ({ sight: { inclinationRad, azimuthRad }, match: matcher.best({ inclinationRad, azimuthRad }) })),
  );
  const ranked = [...seen].sort((p, q) => p.match.match - q.match.match);
  if (seen.length === 1) return seen[0]!;
  const apart = (p: Sight, q: Sight): boolean => Math.abs(Math.sin((p.azimuthRad - q.azimuthRad) / 2)) > Math.sin((1.5 * Math.PI) / grid.azimuths) || Math.abs(p.inclinationRad - q.inclinationRad) > (2 * FARTHEST) / grid.inclinations;
  const starts = ranked.filter(({ sight }, i) => ranked.slice(0, i).every((other) => apart(sight, other.sight))).slice(0, KEPT);
  const found = starts.map(({ sight }) => {
    const at = refined(route.name, (one) => matcher.best(one).match, sight, range, grid);
    return { sight: at, match: matcher.best(at) };
  });
  return [ranked[0]!, ...found].reduce((p, q) => (q.match.match < p.match.match ? q : p));
}

function sightsOn(grid: Grid, { inclinationRad, azimuthRad }: Range): { sight: Sight; share: number }[] {
  const rows = inclinationRad === null ? legendreRule(grid.legendre).map(({ x, w }) => ({ inclinationRad: Math.acos(x), share: w / 2 })) : [{ inclinationRad, share: 1 }];
  const columns = azimuthRad === null ? azimuthsOf(grid) : [azimuthRad];
  return rows.flatMap((row) => columns.map((azimuth) => ({ sight: { inclinationRad: row.inclinationRad, azimuthRad: azimuth }, share: row.share / columns.length })));
}

/** Plain, or the cube root of the mean of 𝓜³ with weights ρ³. */
export function meanOf(weighed: readonly Weighed[], statistic: 'mean' | 'weighted'): number {
  if (statistic === 'mean') return weighed.reduce((sum, { share, match }) => sum + share * match.match, 0);
  const [above, below] = weighed.reduce(([p, q], { share, match }) => {
    const cube = share * match.powerA ** 1.5;
    return [p + cube * match.match ** 3, q + cube] as const;
  }, [0, 0] as readonly [number, number]);
  return Math.cbrt(above / below);
}

/**
 * The mean match over the sights that are not fixed: uniform in azimuth and in cos ι.
 * Shape:  the sights with their shares, and what the sum over them leaves open.
 * Units:  dimensionless.
 * Error:  Gauss–Legendre in cos ι, even steps in azimuth; `doubt` is the change on three quarters as many.
 * Fails:  NaN when a sight has no match.
 * Source: settings.md section 4 (Q11).
 */
export function meanMatch({ route, matcher }: SightProblem, range: Range, statistic: 'mean' | 'weighted'): { sights: Weighed[]; value: number; doubt: number } {
  const on = (grid: Grid): Weighed[] => sightsOn(grid, range).map(({ sight, share }) => ({ sight, share, match: matcher.best(sight) }));
  const sights = on(grids[route.name]);
  const value = meanOf(sights, statistic);
  const doubt = route.name === 'A' ? Math.abs(meanOf(on(thinner(grids.A)), statistic) - value) : 0;
  return { sights, value, doubt };
}
