import type { Band, Side } from '@/lib/engine/contract/route';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { Waveform } from '@/lib/engine/contract/waveform';

/** Signals with closed-form inner products, as the engine's routes take them. */
const bare = { name: 'x', amplitudeUnit: 'strain', variable: 'strain', unit: 's', negativeM: null } as const;
const nothingKnown = { ownTotalMassMsun: null, ownDistanceMpc: null, junkEndM: null, binary: {}, significantDigits: null } as const;

const sideOf = (waveform: Waveform): Side => ({
  waveform,
  taper: { start: null, end: null },
  secondsPerUnit: 1,
  strainPerUnit: 1,
  inclinationRad: 0,
  azimuthRad: 0,
});

export interface Polarisations {
  readonly plus: number;
  readonly cross: number;
}

export function timeSide(firstS: number, lastS: number, rateHz: number, at: (t: number) => Polarisations): Side {
  const n = Math.round((lastS - firstS) * rateHz) + 1;
  const axis = Float64Array.from({ length: n }, (_, i) => firstS + i / rateHz);
  const values = Array.from(axis, at);
  const plus = Float64Array.from(values, (v) => v.plus);
  const cross = Float64Array.from(values, (v) => v.cross);
  return sideOf({
    ...bare,
    ...nothingKnown,
    domain: 'time',
    axis,
    uniformStep: 1 / rateHz,
    content: { kind: 'line-of-sight', plus, cross },
  });
}

export interface ComplexPolarisations extends Polarisations {
  readonly plusIm: number;
  readonly crossIm: number;
}

/** A transform given at frequencies spaced evenly in their logarithm. */
export function frequencySide(fromHz: number, toHz: number, n: number, at: (f: number) => ComplexPolarisations): Side {
  const axis = Float64Array.from({ length: n }, (_, i) => fromHz * (toHz / fromHz) ** (i / (n - 1)));
  const values = Array.from(axis, at);
  const column = (name: keyof ComplexPolarisations) => Float64Array.from(values, (v) => v[name]);
  const content = {
    kind: 'line-of-sight' as const,
    plus: column('plus'),
    cross: column('cross'),
    plusIm: column('plusIm'),
    crossIm: column('crossIm'),
  };
  return sideOf({ ...bare, ...nothingKnown, domain: 'frequency', axis, uniformStep: null, content });
}

export function bandOf(psd: (f: number) => number, fLowHz: number, fHighHz: number): Band {
  const noise: NoiseCurve = {
    name: 'closed form',
    builtIn: null,
    fLowHz: fLowHz / 2,
    fHighHz: fHighHz * 2,
    psd,
    points: null,
    alreadyAveraged: false,
    source: 'closed form',
  };
  return { noise, fLowHz, fHighHz };
}

export const white = (): number => 1e-46;
