import { houseMatchThreshold } from '@/lib/engine/contract/house-values';
import { detectorPoint, type DetectorPoint, type PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { BestTemplate, DetectorRoute } from '@/lib/engine/contract/route';
import { areaByBasis } from '@/lib/engine/fraction/area-by-basis';
import { areaBySegments, splineBySegments } from '@/lib/engine/fraction/area-by-segments';
import type { Area, FractionFound, FractionProblem, SampledMatch } from '@/lib/engine/fraction/fraction-found';
import { fractionBudget } from './fraction-budget';
import { measureOf, sampleLooks, sampleStops, spinOf } from './fraction-sample';
import { powerInResponse } from './loudness';
import { matchRequest, pairTraits, rescale, settled } from './match-recipe';
import { ROUNDING_FLOOR, type Evaluated, type Recipe, type RouteKit } from './recipe';
import { fractionFigures } from './template-figures';

const thresholdOf = ({ declared }: PointRequest): number => declared.threshold ?? houseMatchThreshold;

/** Matches do not hang on the threshold or the weight, so that a sweep over thresholds asks for them once. */
const matched = new WeakMap<readonly unknown[], WeakMap<DetectorRoute, Map<string, readonly BestTemplate[]>>>();

function bestOfEach({ route, onStep }: RouteKit, request: PointRequest, point: DetectorPoint): readonly BestTemplate[] {
  const { threshold: _, weight: __, ...declared } = request.declared;
  const byRoute = matched.get(request.signals ?? []) ?? new WeakMap<DetectorRoute, Map<string, readonly BestTemplate[]>>();
  matched.set(request.signals ?? [], byRoute);
  const known = byRoute.get(route) ?? new Map<string, readonly BestTemplate[]>();
  byRoute.set(route, known);
  const key = JSON.stringify(declared);
  const { a: ___, b: ____, ...shared } = matchRequest(point);
  const found = known.get(key) ?? route.bestTemplates(point.signals, { ...shared, templates: point.templates, ...(onStep ? { onStep } : {}) });
  known.set(key, found);
  return found;
}

const rhoOf = (route: DetectorRoute, point: DetectorPoint, i: number): number => Math.sqrt(powerInResponse(route.gram(point.signals[i]!, point.band), point.response));

export const problemOf = (samples: readonly SampledMatch[], request: PointRequest): FractionProblem => ({
  spins: samples.map(({ spin }) => spin),
  matches: samples.map(({ outcome }) => outcome.match),
  rhos: samples.map(({ rho }) => rho),
  threshold: thresholdOf(request),
  measure: measureOf(request),
});

const areaOf = (route: DetectorRoute, problem: FractionProblem): Area => (route.name === 'A' ? areaBySegments(problem) : areaByBasis(problem));

/** Samples beside an edge: a cubic spline forgets what is further away by a factor four a step. */
const BESIDE = 2;

/** Signals whose matches decide where the edges are; without an edge the one nearest the threshold. */
function decisive({ samples, area }: FractionFound, threshold: number): Set<number> {
  const last = samples.length - 1;
  const inner = area.regions.flat().filter((edge) => edge > samples[0]!.spin && edge < samples[last]!.spin);
  const chosen = new Set<number>();
  for (const edge of inner) {
    const above = samples.findIndex(({ spin }) => spin >= edge);
    for (let i = above - BESIDE; i < above + BESIDE; i++) if (i >= 0 && i <= last) chosen.add(i);
  }
  if (chosen.size > 0) return chosen;
  const apart = samples.map(({ outcome }) => Math.abs(outcome.match - threshold));
  return new Set([apart.indexOf(Math.min(...apart))]);
}

/** The part of a range of spins in which signals are matched at or above a threshold (Q05). */
export const fractionRecipe: Recipe = {
  traits: pairTraits,
  evaluate: (kit, request): Evaluated => {
    const point = detectorPoint(request);
    const { volume } = measureOf(request);
    const best = bestOfEach(kit, request, point);
    const order = point.signals.map((_, i) => i).sort((p, q) => spinOf(request.signals![p]!.given) - spinOf(request.signals![q]!.given));
    const samples = order.map((i): SampledMatch => ({ spin: spinOf(request.signals![i]!.given), template: best[i]!.index, outcome: best[i]!.outcome, rho: volume ? rhoOf(kit.route, point, i) : 1 }));
    const area = areaOf(kit.route, problemOf(samples, request));
    const edges = area.regions.flat();
    const bounded = samples.some(({ outcome }) => outcome.onBound);
    return {
      value: area.fraction,
      components: { edgeLow: edges[0] ?? null, edgeHigh: edges[edges.length - 1] ?? null, points: samples.length },
      fraction: { samples, order, area },
      ...(bounded ? { remarks: ['lower bound only'] } : {}),
    };
  },
  again: ({ route }, request, { fraction }) => {
    if (fraction === undefined) return Number.NaN;
    const point = detectorPoint(request);
    const { volume } = measureOf(request);
    const chosen = decisive(fraction, thresholdOf(request));
    const samples = fraction.samples.map((sample, k): SampledMatch => {
      if (!chosen.has(k)) return sample;
      const i = fraction.order[k]!;
      const asked = matchRequest({ ...point, a: point.signals[i]!, b: point.templates[sample.template]! });
      return { ...sample, outcome: route.match(settled(asked, sample.outcome)), rho: volume ? rhoOf(route, point, i) : 1 };
    });
    return areaBySegments(problemOf(samples, request)).fraction;
  },
  floor: () => ROUNDING_FLOOR,
  snrLike: false,
  stops: sampleStops,
  looks: sampleLooks,
  ownBudget: fractionBudget,
  ownFigures: ({ request, found: { fraction } }) => {
    if (fraction === undefined) return [];
    const problem = problemOf(fraction.samples, request);
    const { m1, m2 } = problem.measure;
    return fractionFigures(request.at, fraction, splineBySegments(problem.spins, problem.matches), problem.threshold, [m1, m2]);
  },
  // Findings look at the templates at the masses at which they fit; a figure of traces shows the signal nearest the threshold.
  shownPoint: (request, { fraction }) => {
    const point = detectorPoint(request);
    if (fraction === undefined) return point;
    const smallest = point.templates.map((_, t) => Math.min(1, ...fraction.samples.filter(({ template }) => template === t).map(({ outcome }) => outcome.massFactor ?? 1)));
    return { ...point, templates: point.templates.map((side, t) => rescale(side, smallest[t]!)) };
  },
};

