import { completeModes } from '../conditioning/complete-modes';
import type { Measurement } from '../contract/measurement';
import { notComputable, type MeasureRequest, type QuantityInputs, type Watch } from '../contract/quantity';
import type { DeclaredSettings, SettingName } from '../contract/settings';
import { measureRadiated } from '../radiation/measure-radiated';
import { radiationRecord } from '../radiation/radiation-record';
import { stop, type At } from '../tones/measure-tones';
import { methodOf } from './balance-method';
import { balanceRecipe, type RemnantNumber } from './balance-recipe';
import { binaryOfInputs } from './fit-point';
import { remnantByRingdown } from './remnant-by-ringdown';

/** Settings that either number of the remnant takes. */
export const remnantSettings: readonly SettingName[] = ['method', 'modes', 'lMax', 'startM', 'integrationFloor', 'window', 'massRatio', 'chi1z', 'chi2z'];

/** A post-Newtonian start needs the mass ratio. */
export function neededForRemnant(inputs: QuantityInputs, declared: DeclaredSettings): readonly SettingName[] {
  const { a } = inputs.of;
  return a !== undefined && methodOf(declared, a.binary) === 'balance-pn' && binaryOfInputs(inputs, declared) === null ? ['massRatio'] : [];
}

/**
 * Measures mass or spin of the remnant by the method of the claim.
 * Shape:  see Measurement.
 * Units:  mass in M, spin dimensionless.
 * Error:  see measureRadiated and remnantByRingdown.
 * Fails:  notComputable with the findings that say why; throws Cancelled when told to stop.
 * Source: Q16; settings.md section 5.
 */
export const measureRemnant =
  (which: RemnantNumber) =>
  (request: MeasureRequest, watch: Watch): Measurement => {
    const { over, inputs, settings, claimId } = request;
    const waveform = inputs.of.a;
    const ats: At[] = over === null ? [{}] : over.values.map((value) => ({ [over.setting]: value }));
    if (waveform === undefined) return notComputable([stop('engine/no-signal', claimId, 'The claim names no waveform.', 'Name one in `of`.')], ats);
    const method = methodOf(settings, waveform.binary);
    if (method === 'ringdown') return remnantByRingdown(which, request, watch);
    const whole = radiationRecord(completeModes(waveform).waveform);
    if ('saw' in whole) return notComputable([stop('engine/no-signal', waveform.name, `A ${which} of the remnant cannot be computed from ${whole.saw}.`, whole.fix)], ats);
    const isOpen = (name: 'chi1z' | 'chi2z'): boolean => settings[name] === undefined && waveform.binary[name] === undefined;
    return measureRadiated(balanceRecipe({ which, method, request, whole, spinAssumed: { chi1z: isOpen('chi1z'), chi2z: isOpen('chi2z') } }), request, watch);
  };
