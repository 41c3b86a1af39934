import type { Finding } from '../contract/finding';
import type { BinaryFacts } from '../contract/waveform';
import type { PreparedPoint } from '../radiation/prepare-radiated';
import { combinedU, computationUncertainty } from '../radiation/radiation-budget';
import type { FindingContext, RadiationRecipe } from '../radiation/radiation-recipe';
import { restrictsModes } from '../radiation/used-modes';
import type { BinaryParameters } from '../synthesis/binary';
import { energyAgainstFits } from './energy-against-fits';
import { energyBalance } from './energy-balance';

/** Fits need both spins, and none is not the same as not stated. */
export function statedBinary({ declared, settings: { binary } }: Pick<PreparedPoint, 'declared' | 'settings'>, facts: BinaryFacts): BinaryParameters | null {
  const isStated = (name: 'chi1z' | 'chi2z'): boolean => declared[name] !== undefined || facts[name] !== undefined;
  return isStated('chi1z') && isStated('chi2z') ? binary : null;
}

/** Standard uncertainty of the computation at a point, in the unit of the recipe. */
export const standardU = (recipe: RadiationRecipe, { completed, point, store, outcome }: FindingContext): number =>
  combinedU(computationUncertainty({ recipe, point, store, digits: completed.waveform.significantDigits }, outcome)) / 2;

/**
 * V24 and V25 of a radiated energy; silent where the claim says which modes it means, for then it is not the whole.
 * Shape:  a list, empty when there is nothing to say.
 * Units:  M.
 * Error:  thresholds only.
 * Fails:  never.
 * Source: domain reference 4.3; settings.md section 8.
 */
export function energyFindings(recipe: RadiationRecipe, context: FindingContext): Finding[] {
  const { completed, point, outcome } = context;
  if (restrictsModes(point)) return [];
  const { binary, name } = completed.waveform;
  const { norm, settings } = point;
  const total = outcome.value * norm;
  // What left since infinite separation left before the initial data too, and is in no initial energy.
  const sinceData = settings.rule === true ? total - (outcome.components.before ?? 0) * norm : total;
  return [...energyBalance(binary, sinceData, standardU(recipe, context) * norm, name), ...energyAgainstFits(statedBinary(point, binary), total, settings.rule === true, name)];
}
