import type { DetectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { DetectorRoute, MatchRequest, Side, Sight, SightMatch, SightMatcher } from '@/lib/engine/contract/route';
import { powerInResponse } from './loudness';
import { matchRequest } from './match-recipe';
import type { RouteKit } from './recipe';

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
      const mass = outcome.massFactor === undefined ? {} : { massFactor: outcome.massFactor, onBound: outcome.onBound ?? false };
      return { match: outcome.match, powerA, b, timeShiftS: outcome.timeShiftS, ...mass };
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

/** Tables say where on the mass axis the maximum lies; b's direction and shift are between the masses that were tabulated. */
const placedByTables = ({ response, maximise }: MatchRequest): boolean => response === 'complex' && maximise.includes('templateMass');

/**
 * The place of b for a sight, found again at its mass from everywhere; without a free mass it is what the tables said.
 * Shape:  one match.
 * Units:  as `SightMatch`.
 * Error:  the route's own search.
 * Fails:  NaN where a side is silent.
 * Source: settings.md rule 2.7.
 */
export function placedAgain({ route, request }: SightProblem, sight: Sight, at: SightMatch): SightMatch {
  if (!placedByTables(request) || at.massFactor === undefined) return at;
  const b = request.rescale(request.b, at.massFactor);
  const asked = { ...request, a: seenFrom(request.a, sight), b: seenFrom(b, sight), maximise: request.maximise.filter((what) => what !== 'templateMass') };
  const { match, timeShiftS, phaseShiftRad, inclinationRad } = route.match(asked);
  const azimuthRad = sight.azimuthRad + (turnsByAzimuth(request) ? phaseShiftRad : 0);
  return { ...at, match, timeShiftS, b: { inclinationRad: inclinationRad ?? sight.inclinationRad, azimuthRad } };
}

/** A maximum on a bound of the mass range is a lower bound only. */
export const boundRemarks = (matches: readonly SightMatch[]): { remarks?: readonly string[] } => (matches.some(({ onBound }) => onBound) ? { remarks: ['lower bound only'] } : {});

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
export function sightProblem({ route, onStep }: Pick<RouteKit, 'route' | 'onStep'>, point: DetectorPoint, b: Side, inclinationRad: number | null): SightProblem {
  const request: MatchRequest = { ...matchRequest(point), b };
  const { a, band, response, maximise } = request;
  const mass = maximise.includes('templateMass') ? { mass: request } : {};
  const step = onStep === undefined ? {} : { onStep: () => onStep(0) };
  const matcher = response === 'complex' ? route.sights({ a, b, band, maximise, inclinationRad, ...mass, ...step }) : oneByOne(route, request);
  return { route, request, matcher };
}

const kept = new WeakMap<DetectorRoute, { readonly request: object; readonly problem: SightProblem }>();

/**
 * The problem that this route was asked last, where it is asked again: a figure reads the tables of the value.
 * Shape:  one problem a route A; route B outlives a claim, and keeps none.
 * Units:  none.
 * Error:  none.
 * Fails:  never.
 * Source: tables over a mass cost as much as the value.
 */
export function keptProblem({ route }: RouteKit, request: object, make: () => SightProblem): SightProblem {
  const known = kept.get(route);
  if (known?.request === request) return known.problem;
  const problem = make();
  if (route.name === 'A') kept.set(route, { request, problem });
  return problem;
}

/** Of the sights of a mean, so many are searched by themselves. */
const CHECKED = 8;

/**
 * A few of a mean's sights, each searched once more without tables; and how far the tables were off there.
 * Shape:  none where no mass is searched for by tables, and for route B, whose error is not asked for.
 * Units:  as `SightMatch`.
 * Error:  `apart` is the largest difference.
 * Fails:  never.
 * Source: our rule: hundreds of masses are not transformed anew for every knob.
 */
export function checkedSights(problem: SightProblem, sights: readonly { readonly sight: Sight; readonly match: SightMatch }[]): { checked: readonly { sight: Sight; match: SightMatch }[]; apart: number } {
  if (!placedByTables(problem.request) || problem.route.name === 'B') return { checked: [], apart: 0 };
  const step = Math.max(1, sights.length / CHECKED);
  const chosen = Array.from({ length: Math.min(CHECKED, sights.length) }, (_, i) => sights[Math.floor(i * step)]!);
  const checked = chosen.map(({ sight, match }) => ({ sight, match: placedAgain(problem, sight, match) }));
  return { checked, apart: Math.max(0, ...checked.map(({ match }, i) => Math.abs(match.match - chosen[i]!.match.match))) };
}
