import { detectorPoint, pointAtRedshift } from '@/lib/engine/conditioning/detector-settings';
import { horizonAgain, horizonOf, type Horizon } from './horizon';
import { horizonFigure } from './horizon-figure';
import type { Evaluated, Recipe } from './recipe';

/** A root is bracketed to 1e-10 in z before its last secant step. */
const ROOT_FLOOR = 1e-10;

interface Told {
  readonly inRedshift: boolean;
  readonly value: (horizon: Horizon) => number;
  readonly components: (horizon: Horizon) => Readonly<Record<string, number>>;
}

/** The same horizon, told as a distance or as a redshift. */
const horizonRecipe = (told: Told): Recipe => ({
  traits: () => ({ maximise: null, loudness: true, absolute: true, needsDistance: true, horizon: true, inRedshift: told.inRedshift }),
  evaluate: (kit, request): Evaluated => {
    const horizon = horizonOf(kit, request);
    const { redshift, distanceMpc, roots } = horizon;
    if (roots.length === 0) return { value: Number.NaN };
    const components = { ...told.components(horizon), rootCount: roots.length, lowestRoot: roots[0]! };
    return { value: told.value(horizon), components, redshift, distanceMpc, roots };
  },
  again: (kit, request, found) => told.value(horizonAgain(kit, request, found.redshift ?? Number.NaN)),
  floor: (value) => ROOT_FLOOR * Math.abs(value),
  snrLike: true,
  ownFigures: ({ kit, request, found }) => horizonFigure(kit, request, found),
  // Findings and figures look at the mass as the detector sees it from the horizon.
  shownPoint: (request, found) => {
    const point = detectorPoint(request);
    const { redshift, distanceMpc } = found;
    return point.massFrame === 'source' && redshift !== undefined && distanceMpc !== undefined ? pointAtRedshift(request, redshift, distanceMpc) : point;
  },
});

export const horizonDistanceRecipe = horizonRecipe({
  inRedshift: false,
  value: ({ distanceMpc }) => distanceMpc,
  components: ({ redshift }) => ({ redshift }),
});

export const horizonRedshiftRecipe = horizonRecipe({
  inRedshift: true,
  value: ({ redshift }) => redshift,
  components: ({ distanceMpc }) => ({ distanceMpc }),
});
