import type { Band, MatchRequest, Side } from '@/lib/engine/contract/route';
import type { Mode, Variable, Waveform } from '@/lib/engine/contract/waveform';

/** Bursts e^{−(t−t₀)²/2s²}·e^{−iωt} as modes or as columns: smooth at both ends, so no taper is needed. */
export interface Burst {
  readonly amplitude: number;
  readonly omega: number;
  readonly width: number;
  readonly at: number;
}

const unknown = { negativeM: null, ownTotalMassMsun: null, ownDistanceMpc: null, junkEndM: null, binary: {}, significantDigits: null } as const;

export const evenAxis = (first: number, last: number, step: number): Float64Array =>
  Float64Array.from({ length: Math.round((last - first) / step) + 1 }, (_, i) => first + i * step);

/** H or its first or second time derivative, in closed form. */
function sample({ amplitude, omega, width, at }: Burst, t: number, order: 0 | 1 | 2): readonly [number, number] {
  const u = (t - at) / width;
  const size = amplitude * Math.exp((-u * u) / 2);
  const [re, im] = [size * Math.cos(omega * (t - at)), -size * Math.sin(omega * (t - at))];
  const [a, b] = [-u / width, -omega];
  if (order === 0) return [re, im];
  const [c, d] = order === 1 ? [a, b] : [a * a - b * b - 1 / (width * width), 2 * a * b];
  return [re * c - im * d, re * d + im * c];
}

export function burstMode(axis: Float64Array, l: number, m: number, burst: Burst, order: 0 | 1 | 2 = 0): Mode {
  const values = Array.from(axis, (t) => sample(burst, t, order));
  return { l, m, re: Float64Array.from(values, ([re]) => re), im: Float64Array.from(values, ([, im]) => im) };
}

export const modeWaveform = (axis: Float64Array, modes: readonly Mode[], uniformStep: number | null, variable: Variable = 'strain'): Waveform => ({
  ...unknown, name: 'W', domain: 'time', unit: 'M', amplitudeUnit: 'rh/M', variable, axis, uniformStep, content: { kind: 'modes', modes },
});

export const columnWaveform = (axis: Float64Array, plus: Float64Array, cross: Float64Array | null, uniformStep: number | null): Waveform => ({
  ...unknown, name: 'W', domain: 'time', unit: 'M', amplitudeUnit: 'rh/M', variable: 'strain', axis, uniformStep, content: { kind: 'line-of-sight', plus, cross },
});

export const sideOf = (waveform: Waveform, changes: Partial<Side> = {}): Side => ({
  waveform, taper: { start: null, end: null }, secondsPerUnit: 1e-3, strainPerUnit: 1e-21, inclinationRad: 0, azimuthRad: 0, ...changes,
});

/** A closed-form curve, steep at low frequencies as detectors are. */
export const steepBand = (fLowHz: number, fHighHz: number): Band => ({
  fLowHz,
  fHighHz,
  noise: { name: 'steep', builtIn: null, fLowHz: 1, fHighHz: 1e5, psd: (f) => 1e-46 * ((f / 50) ** -4 + 1 + (f / 200) ** 2), points: null, alreadyAveraged: false, source: 'closed form' },
});

/** The same curve as a table: kinks at its points. */
export function tabulatedBand(fLowHz: number, fHighHz: number, points: number): Band {
  const smooth = steepBand(fLowHz, fHighHz);
  const f = Float64Array.from({ length: points }, (_, i) => 5 * 200 ** (i / (points - 1)));
  const psd = (x: number): number => {
    const i = Math.max(0, Math.min(points - 2, f.findIndex((fi) => fi > x) - 1));
    const share = Math.log(x / f[i]!) / Math.log(f[i + 1]! / f[i]!);
    return smooth.noise.psd(f[i]!) ** (1 - share) * smooth.noise.psd(f[i + 1]!) ** share;
  };
  return { ...smooth, noise: { ...smooth.noise, name: 'table', psd, points: f, fLowHz: 5, fHighHz: 1000 } };
}

const stretch = (b: Side, factor: number): Side => ({ ...b, secondsPerUnit: b.secondsPerUnit * factor, strainPerUnit: b.strainPerUnit * factor });

export const requestOf = (a: Side, b: Side, changes: Partial<MatchRequest> = {}): MatchRequest => ({
  a, b, band: steepBand(20, 400), response: 'plus', maximise: ['time', 'phase'], templateMassRange: [0.5, 2], rescale: stretch, ...changes,
});
