import type { PointRequest } from '@/lib/engine/conditioning/detector-settings';
import { detectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';
import { excessAt } from './horizon';
import type { Evaluated, RouteKit } from './recipe';

const DRAWN = 60;
const NEAREST = 0.02;
/** Beyond the farthest root, as much again. */
const BEYOND = 2;

/**
 * Loudness over redshift with the threshold: where it falls through is the horizon, and a mass that comes into the band again shows as a second hill.
 * Shape:  60 redshifts, evenly in the logarithm, to twice the farthest root; none for masses of the detector's frame.
 * Units:  dimensionless.
 * Error:  for the eye only.
 * Fails:  never; a redshift at which nothing is heard is null.
 * Source: Q08.
 */
export function horizonFigure({ scan }: RouteKit, request: PointRequest, { roots = [], redshift }: Evaluated): Figure[] {
  const { massFrame, threshold } = detectorPoint(request);
  const farthest = roots.at(-1);
  if (massFrame !== 'source' || redshift === undefined || farthest === undefined) return [];
  const from = Math.min(NEAREST, roots[0]! / 4);
  const to = BEYOND * farthest;
  const zs = Array.from({ length: DRAWN }, (_, i) => from * (to / from) ** (i / (DRAWN - 1)));
  const x = [...new Set([...zs, ...roots])].sort((p, q) => p - q);
  const heard = (z: number): number | null => {
    const rho = threshold * Math.exp(excessAt(scan, request, z));
    return rho > 0 && Number.isFinite(rho) ? rho : null;
  };
  const line = (label: string, role: FigureSeries['role'], values: readonly (number | null)[]): FigureSeries => ({ label, unit: '', role, axis: 'left', scale: 'log', values });
  return [
    {
      kind: 'curve',
      title: 'Loudness over redshift, and the threshold',
      at: request.at,
      x: { label: 'redshift', unit: '', scale: 'log', values: x },
      series: [
        line(`${request.a.given.name}: signal-to-noise ratio`, 'recomputed', x.map(heard)),
        line('threshold: signal-to-noise ratio', 'noise', x.map(() => threshold)),
        { ...line(roots.length > 1 ? 'roots, the last the horizon: signal-to-noise ratio' : 'horizon: signal-to-noise ratio', 'noise', x.map((z) => (roots.includes(z) ? threshold : null))), points: true },
      ],
    },
  ];
}
