import type { DetectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { DetectorRoute, MatchRequest, Side, Sight, SightMatch, SightMatcher } from '@/lib/engine/contract/route';
import { powerInResponse } from './loudness';
import { matchRequest } from './match-recipe';

const seenFrom = (side: Side, { inclinationRad, azimuthRad }: Sight): Side => ({ ...side, inclinationRad, azimuthRad });

/** With both polarisations a free phase is b's azimuth, where b has modes to turn. */
const turnsByAzimuth = ({ response, maximise, b }: MatchRequest): boolean => response === 'complex' && maximise.includes('phase') && b.waveform.content.kind === 'modes';

/** One whole search for each sight: for responses in which the modes' products do not add up as they stand. */
function oneByOne(route: DetectorRoute, request: MatchRequest): SightMatcher {
  return {
    best: (sight) => {
      const asked = { ...request, a: seenFrom(request.a, sight), b: seenFrom(request.b, sight) };
      const outcome = route.match(asked);
      const b = {
        inclinationRad: outcome.inclinationRad ?? sight.inclinationRad,
        azimuthRad: sight.azimuthRad + (turnsByAzimuth(asked) ? outcome.phaseShiftRad : 0),
      };
      const powerA = powerInResponse(route.gram(asked.a, asked.band), asked.response);
      const massFactor = outcome.massFactor === undefined ? {} : { massFactor: outcome.massFactor };
      return { match: outcome.match, powerA, b, timeShiftS: outcome.timeShiftS, ...massFactor };
    },
    held: (sight, at) => ({ ...at, match: settledMatch(route, request, sight, at) }),
  };
}

/**
 * The match from one sight with b's direction and mass held, by the route's own search over shift and turn alone.
 * Shape:  scalar.
 * Units:  dimensionless.
 * Error:  the route's; the residual keeps digits that a table of products would not.
 * Fails:  NaN where a side is silent.
 * Source: settings.md rule 2.7.
 */
export function settledMatch(route: DetectorRoute, request: MatchRequest, sight: Sight, at: SightMatch): number {
  const b = at.massFactor === undefined ? request.b : request.rescale(request.b, at.massFactor);
  const held = new Set(['inclination', 'templateMass', ...(turnsByAzimuth(request) ? ['phase'] : [])]);
  const maximise = request.maximise.filter((what) => !held.has(what));
  return route.match({ ...request, a: seenFrom(request.a, sight), b: seenFrom(b, at.b), maximise, nearShiftS: at.timeShiftS }).match;
}

export interface SightProblem {
  readonly route: DetectorRoute;
  readonly request: MatchRequest;
  readonly matcher: SightMatcher;
}

/**
 * Two waveforms to be matched from many sights.
 * Shape:  `inclinationRad` where all sights share one, else null.
 * Units:  none of its own.
 * Error:  the route's.
 * Fails:  never.
 * Source: settings.md rules 2.2 and 2.7.
 */
export function sightProblem(route: DetectorRoute, point: DetectorPoint, b: Side, inclinationRad: number | null): SightProblem {
  const request: MatchRequest = { ...matchRequest(point), b };
  const tabled = request.response === 'complex' && !request.maximise.includes('templateMass');
  const matcher = tabled ? route.sights({ a: request.a, b, band: request.band, maximise: request.maximise, inclinationRad }) : oneByOne(route, request);
  return { route, request, matcher };
}
