import type { MeasureRequest, Quantity } from '@/lib/engine/contract/quantity';
import type { Measurement } from '@/lib/engine/contract/measurement';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { BinaryFacts, Mode, Variable, Waveform } from '@/lib/engine/contract/waveform';
import { radiatedEnergy } from '@/lib/engine/quantities/radiated-energy';

const blank = { negativeM: 'given', ownTotalMassMsun: null, ownDistanceMpc: null, junkEndM: null, significantDigits: null } as const;

/** A mode set in M on equal steps. */
export function modeSet(axis: Float64Array, modes: readonly Mode[], variable: Variable = 'strain', binary: BinaryFacts = {}): Waveform {
  const steps = axis.length - 1;
  const step = (axis[steps]! - axis[0]!) / steps;
  const isEven = axis.every((t, i) => i === 0 || Math.abs(t - axis[i - 1]! - step) < 1e-5 * step);
  return {
    ...blank,
    name: 'W',
    domain: 'time',
    unit: 'M',
    amplitudeUnit: 'rh/M',
    variable,
    axis,
    uniformStep: isEven ? step : null,
    content: { kind: 'modes', modes },
    binary,
  };
}

export function measureOf(
  quantity: Quantity,
  waveform: Waveform,
  settings: DeclaredSettings = {},
  over: MeasureRequest['over'] = null,
  withFigures = false,
): Measurement {
  const claimed = over === null ? [null] : over.values.map(() => null);
  const request: MeasureRequest = { claimId: 'E', inputs: { of: { a: waveform }, noise: null }, settings, over, claimed, withFigures };
  return quantity.measure(request, { onProgress: () => undefined, cancelled: () => false });
}

export const measureEnergyOf = (...[waveform, settings, over, withFigures]: Parameters<typeof measureOf> extends [Quantity, ...infer Rest] ? Rest : never): Measurement =>
  measureOf(radiatedEnergy, waveform, settings, over, withFigures);

/** The number by the route asked for; NaN when it was not computed. */
export const numberBy = (quantity: Quantity, route: 'A' | 'B', waveform: Waveform, settings: DeclaredSettings = {}): number =>
  measureOf(quantity, waveform, settings).points[0]?.routes[route] ?? Number.NaN;

export const energyBy = (route: 'A' | 'B', waveform: Waveform, settings: DeclaredSettings = {}): number => numberBy(radiatedEnergy, route, waveform, settings);

/** One complex series sampled from a closed form. */
export function modeFrom(axis: Float64Array, l: number, m: number, at: (t: number) => readonly [number, number]): Mode {
  const values = Array.from(axis, at);
  return { l, m, re: Float64Array.from(values, ([re]) => re), im: Float64Array.from(values, ([, im]) => im) };
}

export const evenTimes = (first: number, last: number, step: number): Float64Array =>
  Float64Array.from({ length: Math.round((last - first) / step) + 1 }, (_, i) => first + i * step);

/** A e^{−t²/2s²−iωt} or its time derivatives. */
export const gaussian =
  (amplitude: number, width: number, omega: number, order: 0 | 1 | 2) =>
  (t: number): readonly [number, number] => {
    const size = amplitude * Math.exp(-(t * t) / (2 * width * width));
    const [re, im] = [size * Math.cos(omega * t), -size * Math.sin(omega * t)];
    const [a, b] = [-t / (width * width), -omega];
    if (order === 0) return [re, im];
    const [c, d] = order === 1 ? [a, b] : [a * a - b * b - 1 / (width * width), 2 * a * b];
    return [re * c - im * d, re * d + im * c];
  };
