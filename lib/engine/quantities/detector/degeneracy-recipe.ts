import { detectorPoint, type DetectorPoint, type PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { BinaryFacts } from '@/lib/engine/contract/waveform';
import { matchRequest } from './match-recipe';
import { sightMaximise, SIGHT_FLOOR } from './mode-content-recipe';
import type { Evaluated, Recipe, RouteKit } from './recipe';
import { inclinationFigure } from './sight-figures';
import { boundRemarks, keptProblem, placedAgain, settledMatch, sightProblem, type SightProblem } from './sight-problem';
import { leastMatch, type Range } from './sight-statistics';
import { sightStops } from './sight-stops';

const hasModes = ({ a, b }: DetectorPoint): boolean => [a, b].some((side) => side?.waveform.content.kind === 'modes');

/** Columns have one line of sight, whatever the claim says of angles. */
function rangeOf(point: DetectorPoint): Range {
  if (!hasModes(point)) return { inclinationRad: 0, azimuthRad: 0 };
  return { inclinationRad: point.declared.inclinationRad ?? null, azimuthRad: point.declared.azimuthRad ?? null };
}

function problemOf(kit: RouteKit, request: PointRequest): { problem: SightProblem; range: Range } {
  const point = detectorPoint(request);
  const range = rangeOf(point);
  return { problem: keptProblem(kit, request, () => sightProblem(kit, point, point.b ?? point.a, range.inclinationRad)), range };
}

/** (m₁χ₁ + m₂χ₂)/M along the orbital angular momentum; null where a spin or the mass ratio is not known. */
export function effectiveSpin(binary: BinaryFacts, declared: DeclaredSettings): number | null {
  const q = declared.massRatio ?? binary.massRatio;
  const chi1 = declared.chi1z ?? binary.chi1z;
  const chi2 = declared.chi2z ?? binary.chi2z;
  return q === undefined || chi1 === undefined || chi2 === undefined ? null : (q * chi1 + chi2) / (1 + q);
}

export const degeneracyRecipe: Recipe = {
  traits: () => ({
    maximise: sightMaximise,
    loudness: false,
    absolute: false,
    needsDistance: false,
    horizon: false,
    response: 'complex',
    goesOver: { inclination: true, azimuth: true },
  }),
  evaluate: (kit, request): Evaluated => {
    const { problem, range } = problemOf(kit, request);
    const least = leastMatch(problem, range);
    const { sight } = least;
    const match = placedAgain(problem, sight, least.match);
    const value = settledMatch(kit.route, problem.request, sight, match);
    const point = detectorPoint(request);
    const place = hasModes(point) ? sight : { inclinationRad: null, azimuthRad: null };
    const components = {
      ...place,
      rhoInd: value < 1 ? 1 / Math.sqrt(2 * (1 - value)) : null,
      chiEffA: effectiveSpin(request.a.given.binary, request.declared),
      chiEffB: effectiveSpin((request.b ?? request.a).given.binary, request.declared),
    };
    return { value, components, sights: [{ sight, share: 1, match }], ...boundRemarks([match]) };
  },
  again: (kit, request, { sights = [] }) => {
    const [only] = sights;
    return only === undefined ? Number.NaN : settledMatch(kit.route, matchRequest(detectorPoint(request)), only.sight, only.match);
  },
  floor: () => SIGHT_FLOOR,
  snrLike: false,
  stops: (request) => {
    const point = detectorPoint(request);
    return [sightStops(request, point.b ?? point.a, rangeOf(point).inclinationRad)];
  },
  ownFigures: ({ kit, request }) => (hasModes(detectorPoint(request)) ? inclinationFigure(problemOf(kit, request).problem, request) : []),
  shownPoint: detectorPoint,
};
