import type { DetectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';
import type { DetectorRoute } from '@/lib/engine/contract/route';
import type { FractionFound } from '@/lib/engine/fraction/fraction-found';
import { matchRequest, settled } from './match-recipe';
import type { Evaluated } from './recipe';

const MASSES = 81;
const SPINS = 181;

const line = (label: string, role: FigureSeries['role'], values: readonly (number | null)[]): FigureSeries => ({ label, quantity: 'match 𝓜', unit: '', role, axis: 'left', scale: 'linear', values });

/**
 * The match with the best template over its mass, everything else free as in the claim.
 * Shape:  81 masses spaced evenly in their logarithm, and the best one; none where the mass is not searched.
 * Units:  M☉, or factors where the files' own masses are used.
 * Error:  for the eye only.
 * Fails:  never.
 * Source: Q04.
 */
export function massFigure(route: DetectorRoute, point: DetectorPoint, { outcome }: Evaluated): Figure[] {
  const { b, templateMassRange: [low, high], massMsun } = point;
  if (b === null || outcome?.massFactor === undefined) return [];
  const even = Array.from({ length: MASSES }, (_, i) => low * (high / low) ** (i / (MASSES - 1)));
  const factors = [...new Set([...even, outcome.massFactor])].sort((p, q) => p - q);
  const asked = matchRequest(point);
  const values = factors.map((massFactor) => {
    const there = settled({ ...asked, b }, { ...outcome, massFactor });
    return route.match(there).match;
  });
  const unit = massMsun ?? 1;
  return [
    {
      kind: 'curve',
      title: `Match with ${b.waveform.name} over the mass of the template`,
      at: point.at,
      x: { label: 'mass of the template', unit: massMsun === null ? '× its own' : 'M☉', scale: 'log', values: factors.map((x) => x * unit) },
      series: [line('best over time and phase', 'recomputed', values), { ...line('fitting factor', 'noise', factors.map((x) => (x === outcome.massFactor ? outcome.match : null))), points: true }],
    },
  ];
}

const evenly = (low: number, high: number, n = SPINS): number[] => Array.from({ length: n }, (_, i) => (i === n - 1 ? high : low + ((high - low) * i) / (n - 1)));

/** Spins along each side of the plane. */
const PLANE_SPINS = 61;
const finite = (x: number): number | null => (Number.isFinite(x) ? x : null);

/**
 * The best match over effective spin with the threshold, and the same over the plane of the two spins, along whose diagonal the signals lie.
 * Shape:  181 spins and the sampled ones; the plane has 61 by 61, and the sampled ones.
 * Units:  dimensionless.
 * Error:  for the eye only.
 * Fails:  never.
 * Source: Q05.
 */
export function fractionFigures(at: Figure['at'], found: FractionFound, matchAt: (spin: number) => number, threshold: number, masses: readonly [number, number]): Figure[] {
  const { samples, area } = found;
  const spins = samples.map(({ spin }) => spin);
  const [low, high] = [spins[0]!, spins[spins.length - 1]!];
  const edges = area.regions.flat();
  const x = [...new Set([...evenly(low, high), ...spins, ...edges])].sort((p, q) => p - q);
  const sampled = new Map(samples.map(({ spin, outcome }) => [spin, outcome.match]));
  const label = { unit: '', scale: 'linear' } as const;
  const place = at === undefined ? {} : { at };
  const curve: Figure = {
    kind: 'curve',
    title: 'Best match over effective spin, and the threshold',
    ...place,
    x: { label: 'effective spin', ...label, values: x },
    series: [
      line('spline through the best matches', 'recomputed', x.map(matchAt)),
      { ...line('best match of each signal', 'noise', x.map((s) => sampled.get(s) ?? null)), points: true },
      line('threshold', 'claimed', x.map(() => threshold)),
      ...(edges.length > 0 ? [{ ...line('edges', 'claimed', x.map((s) => (edges.includes(s) ? matchAt(s) : null))), points: true as const }] : []),
    ],
  };
  const [m1, m2] = masses;
  const grid = [...new Set([...evenly(low, high, PLANE_SPINS), ...spins])].sort((p, q) => p - q);
  return [
    curve,
    {
      kind: 'plane',
      title: 'Best match over the plane of the two spins, and where it is the threshold',
      ...place,
      x: { label: 'spin of the heavier body', ...label, values: grid },
      series: [{ ...line('sampled signals', 'noise', grid.map((s) => (sampled.has(s) ? s : null))), points: true }],
      plane: {
        y: { label: 'spin of the lighter body', unit: '', values: grid },
        level: { label: 'best match', unit: '', values: grid.flatMap((chi2) => grid.map((chi1) => finite(matchAt(m1 * chi1 + m2 * chi2)))) },
        threshold,
      },
    },
  ];
}
