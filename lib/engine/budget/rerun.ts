import type { MeasureRequest, Quantity, QuantityInputs, Watch } from '../contract/quantity';
import type { DeclaredSettings } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import type { SweptValue } from '@/lib/kernel/place';

/** What is different in a second computation of the same number. */
export interface Change {
  readonly settings?: DeclaredSettings;
  /** Put in the place of every waveform of the claim. */
  readonly waveform?: (given: Waveform) => Waveform;
  /** Instead of the swept setting's value at this point. */
  readonly swept?: SweptValue;
}

/** The claim's number at its worst point once more, by route A; null where the change leaves nothing to compute. */
export type Rerun = (change: Change) => number | null;

export type Measured = Pick<Quantity, 'id' | 'measure' | 'settings'>;

const replaced = (inputs: QuantityInputs, by: (given: Waveform) => Waveform): QuantityInputs => {
  const of = Object.fromEntries(Object.entries(inputs.of).map(([role, given]) => [role, Array.isArray(given) ? (given as readonly Waveform[]).map(by) : by(given as Waveform)]));
  return { noise: inputs.noise, of };
};

/**
 * Gives the claim's number under other circumstances. A waveform that plays two parts is replaced in both by the same one.
 * Shape:  one number a call.
 * Units:  the quantity's.
 * Error:  route A's.
 * Fails:  null where the changed claim is stopped; throws Cancelled when told to stop.
 * Source: ours: a component is found by computing the number again, whatever the quantity is.
 */
export function rerunner(quantity: Measured, request: MeasureRequest, index: number, watch: Watch): Rerun {
  const quiet: Watch = { onProgress: () => undefined, cancelled: watch.cancelled };
  const { over } = request;
  return ({ settings = {}, waveform, swept }) => {
    const known = new Map<Waveform, Waveform>();
    const once = (given: Waveform): Waveform => {
      const made = known.get(given) ?? waveform!(given);
      known.set(given, made);
      return made;
    };
    const measurement = quantity.measure(
      {
        claimId: request.claimId,
        inputs: waveform === undefined ? request.inputs : replaced(request.inputs, once),
        settings: { ...request.settings, ...settings },
        over: over === null ? null : { setting: over.setting, values: [swept ?? over.values[index]!] },
        claimed: [null],
        withFigures: false,
        routeAOnly: true,
      },
      quiet,
    );
    const value = measurement.points[0]?.value ?? null;
    return value !== null && Number.isFinite(value) ? value : null;
  };
}
