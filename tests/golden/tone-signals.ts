import type { MeasureRequest, Quantity } from '@/lib/engine/contract/quantity';
import type { Measurement } from '@/lib/engine/contract/measurement';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Waveform } from '@/lib/engine/contract/waveform';

/** A claim about one or two waveforms, measured. */
export function measureTonesOf(quantity: Quantity, of: { readonly a: Waveform; readonly b?: Waveform }, settings: DeclaredSettings = {}, over: MeasureRequest['over'] = null, withFigures = false): Measurement {
  const claimed = over === null ? [null] : over.values.map(() => null);
  const request: MeasureRequest = { claimId: 'T', inputs: { of, noise: null }, settings, over, claimed, withFigures };
  return quantity.measure(request, { onProgress: () => undefined, cancelled: () => false });
}

/** The number by the route asked for; NaN when it was not computed. */
export const toneBy = (route: 'A' | 'B', quantity: Quantity, of: { readonly a: Waveform; readonly b?: Waveform }, settings: DeclaredSettings = {}): number =>
  measureTonesOf(quantity, of, settings).points[0]?.routes[route] ?? Number.NaN;

/**
 * A mode that swells, peaks at t = 0 and rings down: e^{−iωt} under a rise e^{g(t)} with
 * g = −γ(√(t² + w²) − w) , whose slope at late times is the decay rate; exact in closed form.
 */
export const swellAndRing =
  (amplitude: number, omega: number, gamma: number, width: number, phase = 0) =>
  (t: number): readonly [number, number] => {
    const size = amplitude * Math.exp(-gamma * (Math.hypot(t, width) - width));
    return [size * Math.cos(omega * t + phase), -size * Math.sin(omega * t + phase)];
  };
