import type { Finding } from '../contract/finding';
import type { FindingContext, RadiationRecipe } from '../radiation/radiation-recipe';
import { restrictsModes } from '../radiation/used-modes';
import type { Balance } from './balance-recipe';
import { energyAgainstFits } from './energy-against-fits';
import { energyBalance, lateRecord } from './energy-balance';
import { standardU, statedBinary } from './energy-findings';
import { postNewtonianStart, startX } from './start-values';

/** Further apart than this, balance and ringing do not speak of the same hole. */
const APART = { mass: 0.02, spin: 0.05 } as const;

function againstRinging({ which }: Balance, { outcome, completed }: FindingContext): Finding[] {
  const { value, components } = outcome;
  const ringing = components.checkRingdown ?? null;
  if (ringing === null || Math.abs(ringing - value) <= APART[which]) return [];
  const { name } = completed.waveform;
  return [{
    code: 'engine/ringdown-against-balance', level: 'worth-a-look', where: name,
    text: `By balance the ${which} of the remnant of ${name} is ${value.toFixed(4)}, by its ringing ${ringing.toFixed(4)}.`,
    fix: 'Check the start values, the modes and the window of the ringdown.',
  }];
}

/** Of a stated initial energy: does the record begin with it? */
function late({ method, whole }: Balance, { point: { settings }, completed }: FindingContext): Finding[] {
  const { admEnergy } = completed.waveform.binary;
  if (method !== 'balance-adm' || admEnergy === undefined || settings.binary === null) return [];
  const x = startX(whole, settings.startM, 'A');
  return x === null ? [] : lateRecord(admEnergy, postNewtonianStart(settings.binary, x).mass, settings.startM, completed.waveform.name);
}

/**
 * What a balance shows beside its number: V24, V25, and whether the ringing agrees.
 * Shape:  a list, empty when there is nothing to say.
 * Units:  M.
 * Error:  none: thresholds only.
 * Fails:  never.
 * Source: domain reference 4.3; settings.md rule 11 and section 8.
 */
export function balanceFindings(balance: Balance, recipe: RadiationRecipe, context: FindingContext): Finding[] {
  const { which, method } = balance;
  const { completed, point, outcome } = context;
  const { binary, name } = completed.waveform;
  const ringing = againstRinging(balance, context);
  if (which === 'spin' || restrictsModes(point)) return [...late(balance, context), ...ringing];
  const radiated = outcome.components.radiated ?? Number.NaN;
  const since = method === 'balance-pn' ? energyAgainstFits(statedBinary(point, binary), 1 - outcome.value, true, name) : [];
  return [...late(balance, context), ...energyBalance(binary, radiated, standardU(recipe, context), name), ...since, ...ringing];
}
