import { houseValues } from '@/lib/engine/contract/house-values';
import { detectorPoint, type DetectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { MaximiseOver } from '@/lib/engine/contract/settings';
import { boundRemark, matchRequest, pairTraits, placement, rescale, settled } from './match-recipe';
import { ROUNDING_FLOOR, type Evaluated, type Recipe } from './recipe';
import { startLines } from './later-starts';
import { massFigure } from './template-figures';

const maximise: readonly MaximiseOver[] = [...houseValues.maximise, 'templateMass'];

/** A mass that is off by 1e-5 of itself lowers a match by less than this, for every hill that a grid of 2 % resolves. */
const MASS_DOUBT = 2.5e-8;

const pairWith = (point: DetectorPoint, { bestTemplate = 0 }: Evaluated): DetectorPoint => ({ ...point, b: point.templates[bestTemplate] ?? null });

/** The largest match over a list of templates and what moves them (Q04). */
export const fittingFactorRecipe: Recipe = {
  traits: () => ({ ...pairTraits(), maximise }),
  evaluate: ({ route, onStep }, request): Evaluated => {
    const point = detectorPoint(request);
    const { a: _, b: __, ...shared } = matchRequest(point);
    const [best] = route.bestTemplates([point.a], { ...shared, templates: point.templates, ...(onStep ? { onStep } : {}) });
    const { index, outcome } = best!;
    const searched = outcome.massFactor !== undefined;
    return {
      value: outcome.match,
      components: { bestTemplate: index, templateMassMsun: point.massMsun, timeShiftS: outcome.timeShiftS, phaseShiftRad: outcome.phaseShiftRad, ...placement(point, outcome) },
      ...boundRemark(outcome, 'lower bound only'),
      outcome,
      bestTemplate: index,
      ...(searched ? { doubt: MASS_DOUBT } : {}),
    };
  },
  again: ({ route }, request, found) => {
    const asked = matchRequest(pairWith(detectorPoint(request), found));
    return route.match(found.outcome === undefined ? asked : settled(asked, found.outcome)).match;
  },
  floor: () => ROUNDING_FLOOR,
  snrLike: false,
  ownBudget: startLines,
  ownFigures: ({ kit, request, found }) => massFigure(kit.route, pairWith(detectorPoint(request), found), found),
  // The findings look at the best template at the mass at which it fits; figures stretch it by themselves.
  shownPoint: (request, found) => {
    const point = detectorPoint(request);
    const { bestTemplate = 0, outcome } = found;
    const templates = point.templates.map((side, i) => (i === bestTemplate && outcome?.massFactor !== undefined ? rescale(side, outcome.massFactor) : side));
    return { ...pairWith(point, found), templates };
  },
};
