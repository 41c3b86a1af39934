import { houseValues } from '@/lib/engine/contract/house-values';
import { detectorPoint, type DetectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { DetectorRoute, MatchOutcome, MatchRequest, Side } from '@/lib/engine/contract/route';
import type { MaximiseOver } from '@/lib/engine/contract/settings';
import { powerInResponse } from './loudness';
import { ROUNDING_FLOOR, type Evaluated, type Recipe } from './recipe';

/** A heavier template is longer and, at the same distance, stronger. */
export const rescale = (b: Side, factor: number): Side => ({
  ...b,
  secondsPerUnit: b.secondsPerUnit * factor,
  strainPerUnit: b.strainPerUnit * factor,
});

export const matchRequest = (point: DetectorPoint): MatchRequest => ({
  a: point.a,
  b: point.b ?? point.a,
  band: point.band,
  response: point.response,
  maximise: point.maximise,
  templateMassRange: point.templateMassRange,
  rescale,
});

/** b put where the search left it, so that a rerun only moves it in time and turns it. */
export function settled(request: MatchRequest, at: MatchOutcome): MatchRequest {
  const searched: MaximiseOver[] = [];
  let { b } = request;
  if (at.massFactor !== undefined) {
    b = rescale(b, at.massFactor);
    searched.push('templateMass');
  }
  if (at.inclinationRad !== undefined) {
    b = { ...b, inclinationRad: at.inclinationRad };
    searched.push('inclination');
  }
  if (request.response === 'complex' && request.maximise.includes('phase') && b.waveform.content.kind === 'modes') {
    b = { ...b, azimuthRad: b.azimuthRad + at.phaseShiftRad };
    searched.push('phase');
  }
  return { ...request, b, maximise: request.maximise.filter((what) => !searched.includes(what)) };
}

export const boundRemark = (outcome: MatchOutcome, word: string): { remarks?: readonly string[] } => (outcome.onBound ? { remarks: [word] } : {});

export const placement = (point: DetectorPoint, outcome: MatchOutcome): Record<string, number> => ({
  ...(outcome.polarisationRad === undefined ? {} : { polarisationRad: outcome.polarisationRad }),
  ...(outcome.inclinationRad === undefined ? {} : { inclinationRad: outcome.inclinationRad }),
  ...(outcome.massFactor === undefined || point.massMsun === null ? {} : { templateMassMsun: point.massMsun * outcome.massFactor }),
});

export const pairTraits = () => ({ maximise: houseValues.maximise, loudness: false, absolute: false, needsDistance: false, horizon: false }) as const;

/** Builds a recipe on one maximised product; `read` takes the value and components from its outcome. */
function recipeOf(
  read: (point: DetectorPoint, outcome: MatchOutcome, route: DetectorRoute) => Evaluated,
  value: (point: DetectorPoint, outcome: MatchOutcome) => number,
  floor: Recipe['floor'],
): Recipe {
  return {
    traits: pairTraits,
    evaluate: ({ route }, request) => {
      const point = detectorPoint(request);
      const outcome = route.match(matchRequest(point));
      return { ...read(point, outcome, route), outcome };
    },
    again: ({ route }, request, found) => {
      const point = detectorPoint(request);
      const asked = matchRequest(point);
      return value(point, route.match(found.outcome === undefined ? asked : settled(asked, found.outcome)));
    },
    floor,
    snrLike: false,
    shownPoint: detectorPoint,
  };
}

export const matchRecipe: Recipe = recipeOf(
  (point, outcome) => ({
    value: outcome.match,
    components: { timeShiftS: outcome.timeShiftS, phaseShiftRad: outcome.phaseShiftRad, ...placement(point, outcome) },
    ...boundRemark(outcome, 'lower bound only'),
  }),
  (_, outcome) => outcome.match,
  () => ROUNDING_FLOOR,
);

/** The residual carries its own digits, but no rerun shows rounding of the samples themselves (1e-16 of a norm each). */
const MISMATCH_FLOOR = 1e-15;

const none: Record<string, number> = {};

export const mismatchRecipe: Recipe = recipeOf(
  (point, outcome): Evaluated => ({
    value: outcome.mismatch,
    components: outcome.massFactor === undefined || point.massMsun === null ? none : { massAt: point.massMsun * outcome.massFactor },
    ...boundRemark(outcome, 'upper bound only'),
  }),
  (_, outcome) => outcome.mismatch,
  (value) => MISMATCH_FLOOR + ROUNDING_FLOOR * Math.abs(value),
);

const parametersOf = (point: DetectorPoint): number => point.declared.parameters ?? houseValues.parameters;
const distinguishable = (point: DetectorPoint, mismatch: number): number => Math.sqrt(parametersOf(point) / (2 * mismatch));

export const distinguishabilityRecipe: Recipe = recipeOf(
  (point, outcome, route) => {
    const request = matchRequest(point);
    const rhoA = Math.sqrt(powerInResponse(route.gram(point.a, point.band), point.response));
    const rhoWithAmplitude = rhoA / Math.sqrt(route.residualPower(request, outcome));
    return {
      value: distinguishable(point, outcome.mismatch),
      components: { mismatch: outcome.mismatch, rhoWithAmplitude: Number.isFinite(rhoWithAmplitude) ? rhoWithAmplitude : null },
      ...boundRemark(outcome, 'lower bound only'),
    };
  },
  (point, outcome) => distinguishable(point, outcome.mismatch),
  (value) => ROUNDING_FLOOR * Math.abs(value) + MISMATCH_FLOOR * Math.abs(value) ** 3,
);

export const overlapRecipe: Recipe = {
  traits: () => ({ ...pairTraits(), maximise: null }),
  evaluate: ({ route }, request) => {
    const { a, b, band, response } = detectorPoint(request);
    return { value: route.overlap(a, b ?? a, band, response) };
  },
  again: (kit, request) => overlapRecipe.evaluate(kit, request).value,
  floor: () => ROUNDING_FLOOR,
  snrLike: false,
  shownPoint: detectorPoint,
};
