import { houseValues } from '../contract/house-values';
import type { Figure } from '../contract/measurement';
import { fluxFigure, runningIntegral } from './flux-figure';
import { roundingOfIntegral } from './input-rounding';
import { rateOf, weightedSum, type ModeProduct } from './mode-products';
import { angularMomentumProducts } from './momentum-products';
import { countedNodes, radiationOnPanels } from './news-on-panels';
import type { PreparedPoint } from './prepare-radiated';
import { missingModesFindings, negativeModesFinding } from './radiation-findings';
import { house, NO_FLOOR, sampledAs, type Outcome, type RadiationRecipe, type SampledStore } from './radiation-recipe';
import { listedButMissing, restrictsModes } from './used-modes';
import { ratesOf, vectorOnSamples, vectorShares, type Vector } from './vector-integrals';

/** What is claimed is J_z; the others are shown. */
const outcomeOf = ([x, y, z]: Vector): Outcome => ({ value: z, vector: [z], components: { x, y, z } });

/**
 * Route B: J from startM to the last sample by splines and Gauss panels.
 * Shape:  three numbers.
 * Units:  M².
 * Error:  that of radiationOnPanels.
 * Fails:  never.
 * Source: Q13; rule 2.9.
 */
export function angularMomentumOnPanels({ record, settings }: PreparedPoint): Vector {
  const { nodes, modes } = radiationOnPanels(record, settings.startM, settings.floor ?? NO_FLOOR, true);
  const { t, w } = countedNodes(nodes);
  const news = modes.map((mode) => mode.news(t));
  const strain = modes.map((mode) => mode.strain!(t));
  const total = (products: readonly ModeProduct[]): number => weightedSum(w, rateOf(products, strain, news, t.length));
  const [x, y, z] = angularMomentumProducts(modes);
  return [total(x), total(y), total(z)];
}

function figureOf(point: PreparedPoint, store: SampledStore, name: string): Figure {
  const radiation = sampledAs(store, point, house);
  const { startM } = point.settings;
  const [, , values] = ratesOf(angularMomentumProducts(point.record.modes), radiation);
  const running = { label: 'Radiated since the start', unit: 'M²', values: runningIntegral(radiation.axis, startM, values!) };
  return fluxFigure(`Flux of angular momentum along z of ${name} and what was radiated since the start`, radiation.axis, startM, { label: 'Flux', unit: 'M', values: values! }, running);
}

/** Radiated angular momentum (Q13). */
export const angularMomentumRecipe: RadiationRecipe = {
  noun: 'angular momentum',
  article: 'An',
  settings: ['modes', 'lMax', 'startM', 'integrationFloor'],
  normaliseBy: houseValues.normaliseBy,
  withStrain: true,
  byRouteA: (point, store, turned) => outcomeOf(vectorOnSamples(angularMomentumProducts(point.record.modes), sampledAs(store, point, turned), point.settings.startM, turned.order)),
  byRouteB: (point) => outcomeOf(angularMomentumOnPanels(point)),
  rounding: (point, store, digits) => roundingOfIntegral(angularMomentumProducts(point.record.modes)[2], point.record, sampledAs(store, point, house), point.settings.startM, digits),
  shares: (point, store) => vectorShares([[], [], angularMomentumProducts(point.record.modes)[2]], sampledAs(store, point, house), point.settings.startM),
  findings: ({ completed, point }) => [
    ...negativeModesFinding(completed, completed.waveform.name, '; without them the angular momentum would be half'),
    ...missingModesFindings(completed, listedButMissing(completed, point), restrictsModes(point), 'angular momentum', 'Higher modes carry some of it too.'),
  ],
  figures: (point, store, name) => [figureOf(point, store, name)],
};
