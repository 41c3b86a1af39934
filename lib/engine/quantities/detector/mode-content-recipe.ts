import { houseValues } from '@/lib/engine/contract/house-values';
import { detectorPoint, type DetectorPoint, type PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { Finding } from '@/lib/engine/contract/finding';
import type { Side } from '@/lib/engine/contract/route';
import type { DeclaredSettings, MaximiseOver } from '@/lib/engine/contract/settings';
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';
import { noSignal } from '@/lib/engine/findings/detector-findings';
import { createRouteA } from '@/lib/engine/routes/a/route-a';
import { houseNumerics } from '@/lib/engine/routes/a/numerics';
import type { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { powerInResponse } from './loudness';
import { matchRequest } from './match-recipe';
import { ROUNDING_FLOOR, type Evaluated, type Recipe, type RouteKit } from './recipe';
import { azimuthFigure } from './sight-figures';
import { boundRemarks, checkedSights, keptProblem, placedAgain, settledMatch, sightProblem, type SightProblem } from './sight-problem';
import { leastMatch, meanMatch, meanOf, type Range } from './sight-statistics';
import { sightStops } from './sight-stops';

/** What matches of whole lines of sight move unless the claim names it. */
export const sightMaximise: readonly MaximiseOver[] = ['time', 'polarisation', 'phase'];

/** Rounding of sums over some twenty modes. */
export const SIGHT_FLOOR = 10 * ROUNDING_FLOOR;

const statisticOf = (declared: DeclaredSettings): 'minimum' | 'mean' | 'weighted' => declared.statistic ?? houseValues.statistic;

const parts = new WeakMap<Waveform, Map<string, Waveform>>();

/** The same record with some of its modes alone; kept, so that its spectra are. */
function partOf(waveform: Waveform, name: string, keep: (mode: Mode) => boolean): Waveform {
  const known = parts.get(waveform) ?? new Map<string, Waveform>();
  parts.set(waveform, known);
  const { content } = waveform;
  const made = known.get(name) ?? { ...waveform, content: content.kind === 'modes' ? { kind: 'modes', modes: content.modes.filter(keep) } : content };
  known.set(name, made);
  return made;
}

const isQuadrupole = ({ l, m }: Mode): boolean => l === 2 && Math.abs(m) === 2;

const quadrupoleOf = (side: Side): Side => ({ ...side, waveform: partOf(side.waveform, 'quadrupole', isQuadrupole) });

const rangeOf = ({ declared }: DetectorPoint): Range => {
  const averaged = statisticOf(declared) !== 'minimum' && declared.inclinationRad === undefined;
  return { inclinationRad: averaged ? null : (declared.inclinationRad ?? houseValues.inclinationRad), azimuthRad: declared.azimuthRad ?? null };
};

function problemOf(kit: RouteKit, request: PointRequest): { problem: SightProblem; range: Range } {
  const point = detectorPoint(request);
  const range = rangeOf(point);
  return { problem: keptProblem(kit, request, () => sightProblem(kit, point, quadrupoleOf(point.a), range.inclinationRad)), range };
}

/** ρ²_ℓm/ρ² along the line of sight at azimuth 0. */
function shares(request: PointRequest, store: SpectrumStore): Record<string, number> {
  const point = detectorPoint(request);
  const { content } = point.a.waveform;
  if (content.kind !== 'modes') return {};
  const route = createRouteA(houseNumerics, store);
  const at = { inclinationRad: point.declared.inclinationRad ?? houseValues.inclinationRad, azimuthRad: 0 };
  const powerOf = (waveform: Waveform): number => powerInResponse(route.gram({ ...point.a, ...at, waveform }, point.band), point.response);
  const whole = powerOf(point.a.waveform);
  return Object.fromEntries(
    content.modes.map(({ l, m }) => {
      const one = partOf(point.a.waveform, `${l},${m}`, (mode) => mode.l === l && mode.m === m);
      return [`rho2:${l},${m}`, powerOf(one) / whole];
    }),
  );
}

function stopsOf(request: PointRequest): (Finding | null)[] {
  const { given } = request.a;
  const { content } = request.a.used(request.declared.lMax ?? null);
  if (content.kind !== 'modes') {
    const text = `${given.name} is the strain along one line of sight; what its modes add to each other cannot be read off it.`;
    return [{ code: 'engine/no-modes', level: 'stops-lodging', where: given.name, text, fix: 'Attach the modes.' }];
  }
  const point = detectorPoint(request);
  return [content.modes.some(isQuadrupole) ? null : noSignal(given.name, 'in (2,2) or (2,−2) among the modes in use'), sightStops(request, quadrupoleOf(point.a), rangeOf(point).inclinationRad)];
}

export const modeContentRecipe: Recipe = {
  traits: (declared) => ({
    maximise: sightMaximise,
    loudness: true,
    absolute: false,
    needsDistance: false,
    horizon: false,
    response: 'complex',
    goesOver: { inclination: statisticOf(declared) !== 'minimum', azimuth: true },
  }),
  evaluate: (kit, request): Evaluated => {
    const { problem, range } = problemOf(kit, request);
    const statistic = statisticOf(request.declared);
    if (statistic !== 'minimum') {
      const { sights, value, doubt } = meanMatch(problem, range, statistic);
      const { checked, apart } = checkedSights(problem, sights);
      return { value, sights, checked, doubt: doubt + apart, ...boundRemarks(sights.map(({ match }) => match)) };
    }
    const least = leastMatch(problem, range);
    const { sight } = least;
    const match = placedAgain(problem, sight, least.match);
    const value = settledMatch(kit.route, problem.request, sight, match);
    return { value, components: { azimuthRad: sight.azimuthRad }, sights: [{ sight, share: 1, match }], ...boundRemarks([match]) };
  },
  again: (kit, request, { sights = [], checked = [] }) => {
    const statistic = statisticOf(request.declared);
    const [only] = sights;
    const point = detectorPoint(request);
    const asked = { ...matchRequest(point), b: quadrupoleOf(point.a) };
    if (checked.length > 0) {
      const moved = checked.map(({ sight, match }) => settledMatch(kit.route, asked, sight, match) - match.match);
      const mean = moved.reduce((sum, by) => sum + by, 0) / moved.length;
      return meanOf(sights.map((one) => ({ ...one, match: { ...one.match, match: one.match.match + mean } })), statistic === 'minimum' ? 'mean' : statistic);
    }
    if (statistic === 'minimum') {
      return only === undefined ? Number.NaN : settledMatch(kit.route, asked, only.sight, only.match);
    }
    const { problem } = problemOf(kit, request);
    return meanOf(
      sights.map((one) => ({ ...one, match: problem.matcher.held(one.sight, one.match) })),
      statistic,
    );
  },
  alsoShown: shares,
  floor: () => SIGHT_FLOOR,
  snrLike: false,
  stops: stopsOf,
  ownFigures: ({ kit, request, found }) => azimuthFigure(problemOf(kit, request).problem, request, found),
  shownPoint: detectorPoint,
};
