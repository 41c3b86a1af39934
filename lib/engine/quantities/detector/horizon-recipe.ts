import { detectorPoint, pointAtRedshift } from '@/lib/engine/conditioning/detector-settings';
import { horizonAgain, horizonOf } from './horizon';
import type { Recipe } from './recipe';

/** A root is bracketed to 1e-10 in z before its last secant step. */
const ROOT_FLOOR = 1e-10;

export const horizonDistanceRecipe: Recipe = {
  traits: () => ({ maximise: null, loudness: true, absolute: true, needsDistance: true, horizon: true }),
  evaluate: (kit, request) => {
    const { distanceMpc, redshift, roots } = horizonOf(kit, request);
    if (roots.length === 0) return { value: Number.NaN };
    return { value: distanceMpc, components: { redshift, rootCount: roots.length, lowestRoot: roots[0]! }, redshift, roots };
  },
  again: (kit, request, found) => horizonAgain(kit, request, found.redshift ?? Number.NaN).distanceMpc,
  floor: (value) => ROOT_FLOOR * Math.abs(value),
  snrLike: true,
  // Findings and figures look at the mass as the detector sees it from the horizon.
  shownPoint: (request, found) => {
    const point = detectorPoint(request);
    return point.massFrame === 'source' && found.redshift !== undefined ? pointAtRedshift(request, found.redshift, found.value) : point;
  },
};
