import type { Measurement } from '@/lib/engine/contract/measurement';
import type { MeasureRequest, Quantity, QuantityInputs } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';
import { evenTimes, modeFrom, modeSet } from './energy-signals';
import { swellAndRing } from './tone-signals';

/** Modes of φ₂, geometric; the file's own field and mass as given. */
export const phi2Set = (axis: Float64Array, modes: readonly Mode[], more: Partial<Waveform> = {}): Waveform => ({ ...modeSet(axis, modes, 'phi2'), name: 'P', amplitudeUnit: 'geometric', ...more });

/** A line of luminosity in erg/s against seconds. */
export function luminosity(axis: Float64Array, at: (t: number) => number, more: Partial<Waveform> = {}): Waveform {
  return { ...modeSet(axis, [], 'luminosity'), name: 'D', unit: 's', content: { kind: 'line-of-sight', plus: axis.map(at), cross: null }, ...more };
}

export function measureOfRoles(quantity: Quantity, of: QuantityInputs['of'], settings: DeclaredSettings = {}, over: MeasureRequest['over'] = null, withFigures = false): Measurement {
  const claimed = over === null ? [null] : over.values.map(() => null);
  return quantity.measure({ claimId: 'X', inputs: { of, noise: null }, settings, over, claimed, withFigures }, { onProgress: () => undefined, cancelled: () => false });
}

export const codesOf = ({ findings }: Measurement): string[] => findings.map(({ code, level }) => `${code} ${level}`);

/** Both routes' numbers at the first point. */
export const bothRoutes = (measurement: Measurement): (number | null)[] => {
  const { A, B } = measurement.points[0]!.routes;
  return [A, B];
};

export const ringTimes = evenTimes(-300, 120, 0.5);
const ring = (size: number, phase: number) => swellAndRing(size, 0.55, 0.085, 4, phase);

/** ψ₄ of a damped tone, and φ₂ in its likeness. */
export const ringing = (size = 0.08, phase = 0, l = 2, m = 2): Mode => modeFrom(ringTimes, l, m, ring(size, phase));
