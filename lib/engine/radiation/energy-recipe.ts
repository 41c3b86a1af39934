import { houseValues } from '../contract/house-values';
import { energyFindings } from '../remnant/energy-findings';
import { energyBefore } from './energy-before';
import { energyOnPanels } from './energy-on-panels';
import { ENERGY_FACTOR, energyOnSamples, totalEnergy, type ModeEnergy } from './energy-on-samples';
import { energyFigure, modesFigure } from './flux-figure';
import { roundingOfIntegral } from './input-rounding';
import type { PreparedPoint } from './prepare-radiated';
import { missingModesFindings, negativeModesFinding } from './radiation-findings';
import { house, NO_FLOOR, sampledAs, type EllShare, type Outcome, type RadiationRecipe } from './radiation-recipe';
import { listedButMissing, restrictsModes } from './used-modes';

function outcomeOf({ whole, settings, norm }: PreparedPoint, modes: readonly ModeEnergy[], route: 'A' | 'B'): Outcome | null {
  const before = settings.binary === null ? (settings.rule === false ? 0 : null) : energyBefore(whole, settings.startM, settings.rule, settings.binary, route);
  if (before === null) return null;
  const components: Record<string, number | null> = {};
  for (const { l, m, energy } of modes) components[`E:${l},${m}`] = energy / norm;
  components.before = before / norm;
  const value = (totalEnergy(modes) + before) / norm;
  return { value, vector: [value], components };
}

/** What each ℓ adds to a sum over modes, ascending. */
export function sharesByEll(modes: readonly ModeEnergy[], norm: number): EllShare[] {
  const sums = new Map<number, number>();
  for (const { l, energy } of modes) sums.set(l, (sums.get(l) ?? 0) + energy);
  return [...sums].map(([l, energy]) => ({ l, size: energy / norm })).sort((a, b) => a.l - b.l);
}

/** Radiated energy (Q12). */
export const energyRecipe: RadiationRecipe = {
  noun: 'energy',
  article: 'An',
  settings: ['modes', 'lMax', 'startM', 'integrationFloor', 'includeEnergyBeforeStart', 'normaliseBy', 'massRatio', 'chi1z', 'chi2z'],
  normaliseBy: houseValues.normaliseBy,
  withStrain: false,
  byRouteA: (point, store, turned) => outcomeOf(point, energyOnSamples(sampledAs(store, point, turned), point.settings.startM, turned.order), 'A'),
  byRouteB: (point) => outcomeOf(point, energyOnPanels(point.record, point.settings.startM, point.settings.floor ?? NO_FLOOR), 'B'),
  rounding: (point, store, digits) => {
    const products = point.record.modes.map((_, i) => ({ a: i, b: i, re: ENERGY_FACTOR, im: 0 }));
    return roundingOfIntegral(products, point.record, sampledAs(store, point, house), point.settings.startM, digits) / point.norm;
  },
  shares: (point, store) => sharesByEll(energyOnSamples(sampledAs(store, point, house), point.settings.startM), point.norm),
  findings: (context) => [
    ...negativeModesFinding(context.completed, context.completed.waveform.name, '; without them the energy would be half'),
    ...missingModesFindings(context.completed, listedButMissing(context.completed, context.point), restrictsModes(context.point), 'energy', 'Higher modes add about 1.6 % at equal mass and 7 % at 2:1.'),
    ...energyFindings(energyRecipe, context),
  ],
  figures: (point, store, name) => [energyFigure(sampledAs(store, point, house), point.settings.startM, name), ...modesFigure(sampledAs(store, point, house), point.settings.startM, name)],
};
